// Loaded into every child by `node --import`: the channel to the parent closes when the parent is gone.
if (process.channel) {
  process.on('disconnect', () => process.exit(1));
  // Waiting for that must not keep a child alive whose work is done.
  process.channel.unref();
}
