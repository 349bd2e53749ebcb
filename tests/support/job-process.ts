import { writeSync } from 'node:fs'
import { replica } from './replica.ts'

// A process that resumes the jobs of a database and prints the number of each chunk that it stored.

const [, , url = ''] = process.argv

const { jobs } = await replica(url, {
  lostAfter: 2,
  onStored: (number) => writeSync(1, `${number}\n`),
  onError: (error) => writeSync(2, `${String(error)}\n`),
})
await jobs.start()
// threads and timers of the jobs hold no process
setInterval(() => undefined, 60_000)
