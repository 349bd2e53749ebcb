// Loaded before the service: on SIGUSR2 every thread of it is killed, wherever it is.
const threads = new Set()
process.on('worker', (worker) => {
  threads.add(worker)
  worker.once('exit', () => threads.delete(worker))
})
process.on('SIGUSR2', () => {
  process.stdout.write(`${JSON.stringify({ level: 30, msg: `killed ${threads.size} threads` })}\n`)
  for (const worker of threads) void worker.terminate()
})
