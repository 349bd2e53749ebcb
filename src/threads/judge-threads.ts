import { availableParallelism } from 'node:os'
import { Worker } from 'node:worker_threads'
import type { Judge, MatchedReport } from '../passages/judge.ts'
import type { Judgement, Judging } from '../passages/judgement.ts'
import { JUDGEMENT_SIZE, readJudgement, REPORT_SIZE, writeReport } from '../passages/judging-numbers.ts'
import type { Fairway } from '../passages/placement.ts'
import type { VesselGuess } from '../passages/vessel-guess.ts'
import type { FromThread, ToThread } from './judge-messages.ts'

/** Matched reports of a log that are judged before threads are called in: less than a second of work (own choice). */
const ALONE = 5000
/** Tasks that wait at a thread before the caller takes one itself: one to work on and one to go on with. */
const MOST_WAITING = 2
/** ms that a thread lives at least before another takes its place: one that cannot start is not tried for each piece */
const LIFE = 1000
/** Threads at most; beyond it reading and writing are what takes the time (own choice). */
const MOST_THREADS = 8

export interface JudgedLog {
  readonly judging: Judging
  readonly fairways: readonly Fairway[]
  /** judges here what no thread is free for */
  readonly judge: Judge
}

/** Judges the matched reports of one log, a batch at a time. */
export interface JudgeSession {
  /** @returns judgement i for report i */
  judge(reports: readonly MatchedReport[]): Promise<readonly (Judgement | undefined)[]>
  close(): void
}

type Judgements = readonly (Judgement | undefined)[]

interface Task {
  readonly reports: readonly MatchedReport[]
  readonly log: JudgedLog
  readonly resolve: (judgements: Judgements) => void
  readonly reject: (error: Error) => void
}

/** Threads that judge reports of logs, started when a log is long enough to be worth them. */
export class JudgeThreads {
  readonly #most: number
  readonly #alone: number
  #threads: Thread[] | undefined
  #isEnded = false
  #sessions = 0

  constructor({ threads = availableParallelism() - 1, alone = ALONE } = {}) {
    this.#most = Math.max(0, Math.min(MOST_THREADS, threads))
    this.#alone = alone
  }

  open(log: JudgedLog): JudgeSession {
    const session = (this.#sessions += 1)
    const held = new Set<Thread>()
    let judged = 0
    return {
      judge: async (reports) => {
        judged += reports.length
        const thread = judged > this.#alone ? this.#leastBusy() : undefined
        if (!thread || thread.waiting >= MOST_WAITING) return judgeHere(reports, log)
        held.add(thread)
        return thread.judge(session, reports, log)
      },
      close: () => {
        for (const thread of held) thread.close(session)
      },
    }
  }

  async end(): Promise<void> {
    this.#isEnded = true
    await Promise.all((this.#threads ?? []).map((thread) => thread.end()))
  }

  #leastBusy(): Thread | undefined {
    if (this.#isEnded) return undefined
    this.#threads ??= Array.from({ length: this.#most }, () => new Thread())
    let found: Thread | undefined
    for (const [i, thread] of this.#threads.entries()) {
      if (!thread.isAlive && performance.now() - thread.started > LIFE) this.#threads[i] = new Thread()
      else if (thread.isAlive && !(found && found.waiting <= thread.waiting)) found = thread
    }
    return found
  }
}

const judgeHere = (reports: readonly MatchedReport[], { judge }: JudgedLog): Judgements =>
  reports.map((report) => judge.judge(report))

/** The file beside this one, as it runs: compiled, or as it is written where a loader reads it. */
function threadFile(): { readonly file: URL; readonly execArgv: string[] } {
  const isWritten = import.meta.url.endsWith('.ts')
  const file = new URL(`./judge-thread.${isWritten ? 'ts' : 'js'}`, import.meta.url)
  return { file, execArgv: isWritten ? ['--import', 'tsx'] : [] }
}

/** One thread and what it was sent. */
class Thread {
  readonly #worker: Worker
  readonly #tasks = new Map<number, Task>()
  /** by session, the vessels that were sent, in their order */
  readonly #sent = new Map<number, Map<VesselGuess, number>>()
  #count = 0
  readonly started = performance.now()
  isAlive = true

  constructor() {
    const { file, execArgv } = threadFile()
    this.#worker = new Worker(file, { execArgv })
    this.#worker.unref()
    this.#worker.on('message', (reply: FromThread) => {
      this.#take(reply)
    })
    // what a lost thread had in hand is judged here instead
    this.#worker.on('error', () => {
      this.#giveUp()
    })
    this.#worker.on('exit', () => {
      this.#giveUp()
    })
  }

  get waiting(): number {
    return this.#tasks.size
  }

  judge(session: number, reports: readonly MatchedReport[], log: JudgedLog): Promise<Judgements> {
    const task = (this.#count += 1)
    const { numbers, newGuesses } = this.#numbered(session, reports, log)
    return new Promise((resolve, reject) => {
      this.#tasks.set(task, { reports, log, resolve, reject })
      this.#post({ kind: 'judge', session, task, newGuesses, reports: numbers }, [
        numbers.buffer as ArrayBuffer,
      ])
    })
  }

  close(session: number): void {
    if (this.#sent.delete(session) && this.isAlive) this.#post({ kind: 'close', session })
  }

  async end(): Promise<void> {
    await this.#worker.terminate()
  }

  #post(message: ToThread, moved: ArrayBuffer[] = []): void {
    this.#worker.postMessage(message, moved)
  }

  #numbered(
    session: number,
    reports: readonly MatchedReport[],
    log: JudgedLog,
  ): { numbers: Float64Array; newGuesses: VesselGuess[] } {
    let sent = this.#sent.get(session)
    if (!sent) {
      this.#sent.set(session, (sent = new Map<VesselGuess, number>()))
      this.#post({ kind: 'open', session, judging: log.judging, fairways: log.fairways })
    }
    const numbers = new Float64Array(reports.length * REPORT_SIZE)
    const newGuesses: VesselGuess[] = []
    reports.forEach((matched, i) => {
      const { guess, placement } = matched
      let number = sent.get(guess)
      if (number === undefined) {
        number = sent.size
        sent.set(guess, number)
        newGuesses.push(guess)
      }
      const fairway = placement.fairway ? numberOf(log.fairways, placement.fairway) : -1
      writeReport(numbers, i * REPORT_SIZE, matched, number, fairway)
    })
    return { numbers, newGuesses }
  }

  #take({ task, judgements, cautions }: FromThread): void {
    const found = this.#tasks.get(task)
    if (!found) return
    this.#tasks.delete(task)
    const { reports, log, resolve } = found
    resolve(
      reports.map((report, i) =>
        readJudgement(judgements, i * JUDGEMENT_SIZE, report, log.judging, cautions[i] ?? []),
      ),
    )
  }

  #giveUp(): void {
    this.isAlive = false
    const tasks = [...this.#tasks.values()]
    this.#tasks.clear()
    for (const { reports, log, resolve, reject } of tasks) {
      try {
        resolve(judgeHere(reports, log))
      } catch (error) {
        reject(error as Error)
      }
    }
  }
}

const numbers = new WeakMap<readonly Fairway[], Map<Fairway, number>>()

/** Index of a fairway in its list. */
function numberOf(fairways: readonly Fairway[], fairway: Fairway): number {
  let known = numbers.get(fairways)
  if (!known) {
    known = new Map(fairways.map((item, i) => [item, i]))
    numbers.set(fairways, known)
  }
  return known.get(fairway) ?? -1
}
