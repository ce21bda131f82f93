// Loaded into every child by `node --import`: the channel to the parent closes when the parent is gone.
if (process.channel) process.on('disconnect', () => process.exit(1));
