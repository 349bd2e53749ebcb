import { setTimeout as wait } from 'node:timers/promises'
import type { Worker } from 'node:worker_threads'
import { afterAll, describe, expect, it } from 'vitest'
import { findVesselClass } from '../../src/domain/vessel-classes.ts'
import { Judge, type MatchedReport } from '../../src/passages/judge.ts'
import type { Judging } from '../../src/passages/judgement.ts'
import { vesselGuess } from '../../src/passages/vessel-guess.ts'
import { JudgeThreads, type JudgedLog } from '../../src/threads/judge-threads.ts'
import { fairway, NO_CONVOY, placement, positionReport, REACH } from '../support/passage-marks.ts'

const FAIRWAYS = [
  fairway('reach-a'),
  fairway('reach-b', {
    ...REACH,
    postedLimits: [{ speed: 2, reference: 'over-ground', direction: 'upstream', appliesTo: {} }],
  }),
]

/** Reports of invented vessels all over both reaches, some that do not fit. */
function reportsOf(count: number): MatchedReport[] {
  return Array.from({ length: count }, (_, i) => {
    const report = positionReport({
      speed: 1 + (i % 7) / 2,
      shipType: i % 3 === 0 ? 37 : 79,
      length: i % 3 === 0 ? 9 : 84,
      beam: i % 3 === 0 ? 3 : 9.4,
      draught: i % 5 === 0 ? 4.5 : i % 2 === 0 ? 2.2 : NaN,
      current: i % 4 === 0 ? 0.3 : NaN,
      waterLevel: i % 11 === 0 ? 0.4 : NaN,
    })
    const guess = vesselGuess(report, NO_CONVOY, findVesselClass)
    if (!guess) throw new Error('every class is built in')
    const direction = ([undefined, 'upstream', 'downstream'] as const)[i % 3]
    const offset = ((i * 7) % 19) - 9
    return { report, guess, placement: placement({ fairway: FAIRWAYS[i % 2], offset, direction }) }
  })
}

function logOf(isFull: boolean): JudgedLog {
  const judging: Judging = { waterLevel: 0, current: 0, tolerance: 0.25, position: 'actual', isFull }
  return { judging, fairways: FAIRWAYS, judge: new Judge(judging) }
}

const threads = new JudgeThreads({ threads: 1, alone: 0 })
afterAll(() => threads.end())

describe('a thread', () => {
  it.each([true, false])(
    'gives the judgements that are made here, to the last digit (full: %s)',
    async (isFull) => {
      const log = logOf(isFull)
      const reports = reportsOf(200)
      const here = reports.map((report) => new Judge(log.judging).judge(report))
      const session = threads.open(log)
      const [first, second] = await Promise.all([
        session.judge(reports.slice(0, 120)),
        session.judge(reports.slice(120)),
      ])
      session.close()
      expect([...first, ...second]).toEqual(here)
      expect(here.filter((judgement) => judgement === undefined).length).toBeGreaterThan(10)
      expect(new Set(here.map((judgement) => judgement?.verdict)).size).toBeGreaterThan(3)
    },
  )

  it('serves logs side by side', async () => {
    const reports = reportsOf(60)
    const [a, b] = [threads.open(logOf(true)), threads.open(logOf(false))]
    const [full, brief] = await Promise.all([a.judge(reports), b.judge(reports)])
    a.close()
    b.close()
    expect(full.some((judgement) => judgement?.cautions.includes('local-rules-apply'))).toBe(true)
    expect(brief.every((judgement) => judgement === undefined || judgement.cautions.length === 0)).toBe(true)
  })

  it('that is lost leaves its work to be done here', async () => {
    const lost = new JudgeThreads({ threads: 1, alone: 0 })
    const log = logOf(false)
    const session = lost.open(log)
    const reports = reportsOf(90)
    const waiting = session.judge(reports)
    await lost.end()
    expect(await waiting).toEqual(reports.map((report) => log.judge.judge(report)))
    expect(await session.judge(reports)).toEqual(await waiting)
    session.close()
  })

  it('that is killed has its work done again, to the last digit, and another takes its place', async () => {
    const made: Worker[] = []
    const note = (worker: Worker): void => void made.push(worker)
    process.on('worker', note)
    const killed = new JudgeThreads({ threads: 1, alone: 0 })
    const log = logOf(true)
    const session = killed.open(log)
    const reports = reportsOf(90)
    const waiting = session.judge(reports)
    await made[0]?.terminate()
    expect(await waiting).toEqual(reports.map((report) => new Judge(log.judging).judge(report)))
    await wait(1100)
    expect(await session.judge(reports)).toEqual(await waiting)
    expect(await session.judge(reports)).toEqual(await waiting)
    expect(made).toHaveLength(2)
    process.off('worker', note)
    session.close()
    await killed.end()
    expect(await session.judge(reports)).toEqual(await waiting)
    expect(made).toHaveLength(2)
  })
})
