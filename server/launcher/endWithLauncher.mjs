// Loaded into the server before its own code. The launcher holds the other end of this channel; when
// it is killed, the channel closes and the server stops as if it had been told to.
if (process.channel) {
  process.once('disconnect', () => {
    process.kill(process.pid, 'SIGTERM');
    setTimeout(() => process.kill(process.pid, 'SIGKILL'), 8000).unref();
  });
  process.channel.unref();
}
