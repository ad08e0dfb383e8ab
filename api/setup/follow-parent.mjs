// Preloaded into the server: when the command that started it is gone without a word (kill -9), the server stops too and frees its port.
process.on('disconnect', () => process.kill(process.pid, 'SIGTERM'))
// The channel alone must not keep a server alive that has closed everything else.
process.channel?.unref()
