import { parentPort } from 'node:worker_threads'
import { Judge } from '../passages/judge.ts'
import { JUDGEMENT_SIZE, readReport, REPORT_SIZE, writeJudgement } from '../passages/judging-numbers.ts'
import type { Fairway } from '../passages/placement.ts'
import type { VesselGuess } from '../passages/vessel-guess.ts'
import type { FromThread, ToThread } from './judge-messages.ts'

/** The thread itself: judges the reports it is sent, session by session. */

interface Session {
  readonly judge: Judge
  readonly isFull: boolean
  readonly fairways: readonly Fairway[]
  readonly guesses: VesselGuess[]
}

const sessions = new Map<number, Session>()

function answer({ task, session, newGuesses, reports }: Extract<ToThread, { kind: 'judge' }>): FromThread {
  const open = sessions.get(session)
  if (!open) throw new RangeError('A task of a session that is not open')
  open.guesses.push(...newGuesses)
  const count = reports.length / REPORT_SIZE
  const judgements = new Float64Array(count * JUDGEMENT_SIZE)
  const cautions: (readonly string[])[] = []
  for (let i = 0; i < count; i += 1) {
    const matched = readReport(reports, i * REPORT_SIZE, open)
    const judgement = open.judge.judge(matched)
    writeJudgement(judgements, i * JUDGEMENT_SIZE, matched, judgement)
    if (open.isFull) cautions.push(judgement?.cautions ?? [])
  }
  return { task, judgements, cautions }
}

parentPort?.on('message', (message: ToThread) => {
  if (message.kind === 'open') {
    const { session, judging, fairways } = message
    sessions.set(session, { judge: new Judge(judging), isFull: judging.isFull, fairways, guesses: [] })
  } else if (message.kind === 'close') {
    sessions.delete(message.session)
  } else {
    const reply = answer(message)
    parentPort?.postMessage(reply, [reply.judgements.buffer as ArrayBuffer])
  }
})
