// Loaded into every child by `node --import`: the channel to the parent closes when the parent is gone. The child's own
// children load it too; they are not ours, and live by their channel.
if (process.channel && process.env.POLHODE_PARENT === String(process.ppid)) {
  process.on('disconnect', () => process.exit(1));
  // Waiting for that must not keep a child alive whose work is done.
  process.channel.unref();
}
