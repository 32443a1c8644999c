// Loaded into every process the starter starts (node --import). When the starter is gone, even by kill -9, its end of the
// channel closes: then this process ends too, cleanly if it can, so that no orphan holds the port.
process.once('disconnect', () => {
  process.kill(process.pid, 'SIGTERM')
  setTimeout(() => process.exit(1), 8_000).unref()
})
