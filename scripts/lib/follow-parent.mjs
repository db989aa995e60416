// Loaded into the server by the script that starts it: when that script dies, however it dies, the
// channel between them closes, and the server stops as if it had been asked to.
process.once('disconnect', () => process.kill(process.pid, 'SIGTERM'));
process.channel?.unref();
