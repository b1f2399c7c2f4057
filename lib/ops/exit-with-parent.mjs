// Preloaded into every process that "start" begins: when the parent is gone, however it went, so is the child.
// What that process forks inherits the preload but not the mark, and keeps its own channel to itself.
if (process.channel && process.env.SELVEDGE_SUPERVISED) {
  delete process.env.SELVEDGE_SUPERVISED;
  process.on('disconnect', () => process.exit(0));
  // The channel is there for this alone; it must not hold a process that has finished.
  process.channel.unref();
}
