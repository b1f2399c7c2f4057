// Preloaded into every process that "start" begins: when the parent is gone, however it went, so is the child.
// The channel exists for this alone; unref keeps it from holding a process that has finished.
if (process.channel) {
  process.on('disconnect', () => process.exit(0));
  process.channel.unref();
}
