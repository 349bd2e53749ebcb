import type { Stretch } from '../limits/plan.ts'
import type { StretchCase } from './evidence-case.ts'
import type { EvidenceView } from './evidence-view.ts'
import {
  counted,
  directionText,
  groupName,
  limitText,
  marginOfStretch,
  ruleSpeed,
  ruleText,
  segmentName,
  vesselName,
} from './evidence-words.ts'
import { kilometres, kmh } from './format.ts'
import { CRITERION_NAMES } from './words.ts'

/** Slack of comparisons of speeds that went through units, m/s. */
const SLACK = 1e-6

/** What is proposed, in a sentence. */
export function proposalText(view: EvidenceView, stretch: Stretch): string {
  const whom = `${groupName(view, stretch.groupId)}, ${directionText(stretch.direction)}`
  const where = `over ${kilometres(stretch.length)} (${counted(stretch.segmentIds.length, 'segment')})`
  switch (stretch.outcome) {
    case 'limit':
      return `Proposed: at most ${limitText(stretch)} over ground for ${whom}, ${where}.`
    case 'kept':
      return `Proposed: the posted limit of ${limitText(stretch)} stays for ${whom}, ${where}.`
    case 'below-smallest-limit':
      return `No speed limit can be proposed for ${whom}, ${where}: other measures are needed.`
  }
}

/** Who allows least and by what. */
function governingText(view: EvidenceView, { governing, lowestMaximum }: Stretch): string {
  if (!governing) return ''
  const { criterion } = governing
  const percentile = view.rules.percentile === null ? '' : ` at percentile ${view.rules.percentile}`
  const who = `${vesselName(view.study.vessels[governing.vessel])}, on ${segmentName(view, governing.segmentId)}`
  if (lowestMaximum === undefined && criterion === undefined) {
    return `Of all cells of this stretch, that of ${who} has no answer${percentile}.`
  }
  const what =
    lowestMaximum === undefined ? `no safe speed${percentile}` : `${kmh(lowestMaximum)}${percentile}`
  const by = criterion === undefined ? '' : `, governed by ${CRITERION_NAMES[criterion].toLowerCase()}`
  return `Of all cells of this stretch, ${who} allows least: ${what}${by}.`
}

/** From what is allowed to what stands on the sign. */
function roundingText(view: EvidenceView, stretch: Stretch): string {
  const { rules } = view
  const { limitSpeed, ceiling, lowestMaximum } = stretch
  if (limitSpeed === undefined || ceiling === undefined) return ''
  const isCut =
    rules.largestLimit !== undefined &&
    lowestMaximum !== undefined &&
    ruleSpeed(rules, rules.largestLimit) <= ceiling + SLACK &&
    lowestMaximum - ceiling > ruleSpeed(rules, rules.signStep) - SLACK
  const down = isCut
    ? `cut to the largest limit of ${ruleText(rules, rules.largestLimit ?? 0)}`
    : `rounded down to steps of ${ruleText(rules, rules.signStep)}`
  const first = `This is ${down}: ${kmh(ceiling)}.`
  if (ceiling - limitSpeed <= SLACK) return first
  return `${first} The limit is lower than that, so that no stretch higher than a neighbour is shorter than the rules allow.`
}

function keptText(stretch: Stretch): string {
  const margin = marginOfStretch(stretch)
  const isAbove = margin !== undefined && margin < -SLACK
  return isAbove
    ? 'The posted limit stays by rule, although it is above what this evidence supports.'
    : 'The posted limit stays by rule; this evidence supports it.'
}

function belowText({ rules }: EvidenceView, stretch: Stretch): string {
  const { smallestLimit } = rules
  if (stretch.lowestMaximum === undefined && stretch.governing?.criterion === undefined) {
    return 'What was not found safe counts as not safe, so that no limit can be drawn.'
  }
  if (stretch.lowestMaximum === undefined) {
    return 'No speed at which this vessel steers keeps every criterion, so that no limit can be drawn from it.'
  }
  if (smallestLimit === undefined) return 'No limit can be drawn from that.'
  return `That is below the smallest limit of ${ruleText(rules, smallestLimit)}, so that no limit is proposed.`
}

/** Why that is proposed, in few sentences. */
export function whyText(view: EvidenceView, { stretch }: StretchCase): string {
  const own = {
    limit: () => roundingText(view, stretch),
    kept: () => keptText(stretch),
    'below-smallest-limit': () => belowText(view, stretch),
  }[stretch.outcome]()
  return [governingText(view, stretch), own].filter((text) => text !== '').join(' ')
}
