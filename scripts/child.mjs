// Preloaded into every process that the starter starts: when the starter is gone, even by kill -9, its channel
// closes, and the process ends itself in its usual way.
process.once('disconnect', () => process.kill(process.pid, 'SIGTERM'));
process.channel?.unref();
