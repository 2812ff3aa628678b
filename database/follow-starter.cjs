/** Loaded into the server: ends it properly when its starter has died without a word, so that no server is left behind. */
process.once('disconnect', () => process.kill(process.pid, 'SIGTERM'));
// Listening must not keep a server alive that has refused to start.
process.channel?.unref();
