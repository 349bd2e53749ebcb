import type { Advisory, CriterionReport } from '../advisory/advise.ts'
import type { CriterionId } from '../advisory/criteria/criterion.ts'
import type { Decision } from '../advisory/decide.ts'
import { DIRECTIONS } from '../domain/segment.ts'
import { atMostFigure, kmh, knots, metresPerSecond } from './format.ts'
import { markup, type Markup } from './html.ts'
import { toKmh } from '../domain/units.ts'
import { criterionName, figuresOf, governingSentence } from './words.ts'

/** What would let a criterion be kept at a speed at which the vessel steers. */
const REMEDIES: Readonly<Record<CriterionId, string>> = {
  'critical-ratio': 'a smaller draught or a higher water level, so that the hull fills less of the section',
  'depth-froude-number': 'a higher water level',
  'bank-wave-height':
    'a smaller draught, a sailing line farther from this bank, or a bank that withstands higher waves',
  'receptor-wave-height': 'a smaller draught, a sailing line farther off, or a sheltered berth or bank',
  'under-keel-clearance': 'a smaller draught or a higher water level',
  drawdown: 'a smaller draught, a higher water level, or a bank that withstands more drawdown',
  'return-current': 'a smaller draught, a higher water level, or a bank that withstands more current',
  'wake-wash': 'a sailing line farther from this bank',
  'posted-limit': 'a vessel that steers at the posted limit, or less current with it',
  'service-speed': 'a vessel with a higher top speed',
}

function unmetLine(decision: Decision, report: CriterionReport): Markup {
  const { situation } = decision
  const { criterion, evaluation, firstSpeed } = report
  const steerage = situation.vessel.minSteerageSpeed
  const [value, limit] = figuresOf(criterion, evaluation)
  const atSteerage =
    evaluation.value === undefined
      ? 'it cannot be evaluated'
      : `it is ${value}, ${criterion.sense === 'at-most' ? 'at most' : 'at least'} ${limit} being ${criterion.sense === 'at-most' ? 'allowed' : 'required'}`
  const first = firstSpeed > 0 ? `reached at ${kmh(firstSpeed)} through the water` : 'not kept at any speed'
  return markup`<li><b>${criterionName(criterion, situation.segment)}</b>: ${first}; at ${kmh(steerage)}, from which the vessel steers, ${atSteerage}. It would take ${REMEDIES[criterion.id]}.</li>`
}

/** Every criterion that stands in the way, and a current that is not made good. */
function changes({ decision, criteria }: Advisory): Markup {
  const steerage = decision.situation.vessel.minSteerageSpeed
  const unmet = criteria.filter(({ firstSpeed }) => firstSpeed < steerage)
  const current = decision.situation.conditions.current
  const isHeld = decision.speed >= steerage && decision.overGround <= 0
  return markup`<div class="governs"><p>What would have to change:</p><ul>${unmet.map((report) => unmetLine(decision, report))}${
    isHeld &&
    markup`<li><b>Current</b>: at the highest speed allowed, ${kmh(decision.speed)} through the water, the vessel makes no way against a current of ${metresPerSecond(Math.abs(current))}. It would take less current.</li>`
  }</ul></div>`
}

function directions({ byDirection }: Advisory): Markup | undefined {
  if (!byDirection) return undefined
  return markup`<p class="also">${DIRECTIONS.map((direction, i) => {
    const own = byDirection[direction]
    const text =
      own.outcome === 'no-safe-speed' ? 'no safe speed' : `${kmh(own.overGround)}, ${knots(own.overGround)}`
    return markup`${i > 0 && ' · '}${direction}: ${text}`
  })}</p>`
}

/** The answer, large. */
export function answerBox(advisory: Advisory): Markup {
  const { decision, sign } = advisory
  if (decision.outcome === 'no-safe-speed') {
    return markup`<section class="answer unsafe" aria-label="Answer"><div><p class="what">For this vessel in these conditions</p><p class="speed">No safe speed</p><p class="also">No speed at which the vessel steers keeps every criterion.</p>${directions(advisory)}</div>${changes(advisory)}</section>`
  }
  const report = advisory.criteria.find(({ isGoverning }) => isGoverning)
  const way = decision.direction === undefined ? '' : ` going ${decision.direction}`
  const signBox = sign
    ? markup`<div class="sign"><span>sign</span><b>${String(sign.value)}</b>${sign.unit}</div>`
    : markup`<div class="sign"><span>sign</span><b>none</b><span>below steerage</span></div>`
  return markup`<section class="answer" aria-label="Answer"><div><p class="what">Recommended maximum speed over ground${way}</p><p class="speed">${atMostFigure(toKmh(decision.overGround), 2)} <small>km/h</small></p><p class="also">${knots(decision.overGround)} · ${kmh(decision.speed)} through the water (${metresPerSecond(decision.speed)})</p>${directions(advisory)}</div>${signBox}<p class="governs"><b>Governed by</b> ${governingSentence(decision, report)}</p></section>`
}
