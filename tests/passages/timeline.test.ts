import { expect, it } from 'vitest'
import { Timeline } from '../../src/passages/timeline.ts'
import { mark } from '../support/passage-marks.ts'

const at = (time: number, line = time) => mark({ report: { time, line }, judgement: {} })

function settledOf(times: readonly number[], maxGap: number): { during: number[]; after: number[] } {
  const timeline = new Timeline(maxGap)
  const during: number[] = []
  const after: number[] = []
  for (const time of times) timeline.add(at(time), ({ report }) => during.push(report.time))
  timeline.end(({ report }) => after.push(report.time))
  return { during, after }
}

it('hands reports on in the order of time, once none before them may come any more', () => {
  expect(settledOf([0, 10, 5, 100, 90, 250], 100)).toEqual({ during: [0, 5, 10, 90, 100], after: [250] })
})

it('holds back what is younger than the gap', () => {
  expect(settledOf([0, 50, 100], 100)).toEqual({ during: [], after: [0, 50, 100] })
})

it('keeps reports of one time in the order in which they came', () => {
  const timeline = new Timeline(10)
  const lines: number[] = []
  for (const line of [1, 2, 3]) timeline.add(at(5, line), () => undefined)
  timeline.end(({ report }) => lines.push(report.line))
  expect(lines).toEqual([1, 2, 3])
})

it('holds reports that are not judged too: one before them may come later', () => {
  const timeline = new Timeline(600)
  const times: number[] = []
  const settle = ({ report }: { report: { time: number } }) => times.push(report.time)
  timeline.add(mark({ report: { time: 60 } }), settle)
  timeline.add(at(0), settle)
  timeline.end(settle)
  expect(times).toEqual([0, 60])
})
