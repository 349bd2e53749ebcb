import type { MethodFit, Trend } from '../calibration/measurement.ts'
import { toKmh } from '../domain/units.ts'
import { SEVERITIES } from '../advisory/caution.ts'
import {
  chosenMethod,
  computedHeight,
  factorOf,
  inRangeCount,
  logResidual,
  methodsWithoutFit,
  rankedMethods,
  standingOf,
  type CalibrationPoint,
  type CalibrationView,
  type ChosenMethod,
  type Standing,
} from './calibration-view.ts'
import { UNKNOWN, count, figure } from './format.ts'
import { markup, type Markup } from './html.ts'
import { HULL_NAMES, SEVERITY_NAMES, methodName, methodShortName } from './words.ts'

/** Rows that a table on paper holds; the calibration itself holds them all. */
const MOST_ROWS = 200

/** An interval of a factor. */
export const intervalText = ([low, high]: readonly [number, number]): string =>
  Number.isFinite(low) && Number.isFinite(high) ? `${figure(low, 2)} to ${figure(high, 2)}` : UNKNOWN

const TREND_NAMES = ['speed', 'distance', 'depth'] as const

const trendText = ({ slope }: Trend, name: string): string =>
  `${name}\u00a0${slope > 0 ? '+' : ''}${figure(slope, 2)}`

/** Figures over which a method drifts. */
function flagsText({ trend }: MethodFit): string {
  const flagged = TREND_NAMES.filter((name) => trend[name].isFlagged)
  return flagged.length === 0 ? 'none' : flagged.map((name) => trendText(trend[name], name)).join(', ')
}

function rankingRow(fit: MethodFit, isRecommended: boolean): Markup {
  return markup`<tr${isRecommended && markup` class="governs"`}><td class="figure" data-name="rank">${String(fit.rank)}</td><th scope="row" class="method">${methodName(fit.id)}<span>${fit.id}${isRecommended && ', recommended'}</span></th><td class="figure" data-name="passages in range">${count(fit.passagesInRange)}</td><td class="figure" data-name="factor">${figure(fit.factor, 2)}</td><td class="figure" data-name="95 % interval">${intervalText(fit.interval)}</td><td class="figure" data-name="scatter">${figure(fit.scatterLogSd, 3)}</td><td class="figure" data-name="bias before">${figure(fit.biasBeforeLog, 3)}</td><td class="figure" data-name="error">${figure(fit.crossValidatedLogError, 3)}</td><td class="whole" data-name="trends flagged">${flagsText(fit)}</td></tr>`
}

export function rankingTable(view: CalibrationView): Markup {
  const rows = rankedMethods(view).map((fit) => rankingRow(fit, fit.id === view.fit.recommended))
  const others = methodsWithoutFit(view).map((id) => {
    const number = inRangeCount(view, id)
    const reason = number < 5 ? 'fewer than five in range: no factor' : 'no factor'
    return markup`<tr><td class="figure" data-name="rank">${UNKNOWN}</td><th scope="row" class="method">${methodName(id)}<span>${id}</span></th><td class="figure" data-name="passages in range">${count(number)}</td><td class="whole" colspan="6">${reason}, does not count on this water</td></tr>`
  })
  return markup`<table class="stack ranking"><caption><b>Table 1.</b> Methods by cross-validated error, those that cover less than 80 % of the passages of the widest after the others. Scatter, bias and error are those of the natural logarithm of measured over computed height: 0.10 stands for about 10 %. The bias is that before any factor, with outliers; the error is that of each passage by the factor of the others. A flagged trend stands with the exponent that the method misses.</caption><thead><tr><th scope="col" class="figure">Rank</th><th scope="col">Method</th><th scope="col" class="figure">Passages<br>in range</th><th scope="col" class="figure">Factor</th><th scope="col" class="figure">95 %<br>interval</th><th scope="col" class="figure">Scatter</th><th scope="col" class="figure">Bias<br>before</th><th scope="col" class="figure">Error</th><th scope="col">Trends<br>flagged</th></tr></thead><tbody>${rows}${others}</tbody></table>`
}

/** Whether the data tell the methods apart, as a sentence or two. */
export function distinctionText(view: CalibrationView): string {
  const [best, next] = rankedMethods(view)
  if (!best)
    return 'No method has five passages in its range, so none has a factor and none can be told from another.'
  const bestName = methodShortName(best.id)
  if (!next) return `Only ${bestName} has a factor: there is no other to tell it from.`
  const nextName = methodShortName(next.id)
  const errors = `cross-validated errors ${figure(best.crossValidatedLogError, 3)} and ${figure(next.crossValidatedLogError, 3)}`
  return view.fit.isDistinguishable
    ? `These data tell ${bestName} from the next, ${nextName}: on the passages that both cover their scatter differs by more than chance explains (95 %; ${errors}).`
    : `These data do not tell ${bestName} from ${nextName}: on the passages that both cover their scatter differs by no more than chance explains, or these are too few; ${errors}. Ranks among such methods are no finding.`
}

export function hullTable(fit: MethodFit | undefined): Markup {
  if (!fit || fit.byHull.length === 0) {
    return markup`<p>No factor by hull: ${fit ? 'passages of one hull only are in the fit, and the common factor is theirs' : 'there is no factor at all'}.</p>`
  }
  const rows = fit.byHull.map(
    ({ hull, passages, factor, interval, pooledWeight }) =>
      markup`<tr><th scope="row">${HULL_NAMES[hull]}</th><td class="figure" data-name="passages">${count(passages)}</td><td class="figure" data-name="factor">${figure(factor, 2)}</td><td class="figure" data-name="95 % interval">${intervalText(interval)}</td><td class="figure" data-name="weight of the common factor">${figure(pooledWeight, 2)}</td></tr>`,
  )
  return markup`<table class="stack"><caption><b>Table 2.</b> Factor of ${methodShortName(fit.id)} by hull. Each is drawn towards the common factor with the weight shown: 0 leaves it as measured, 1 puts the common one in its place.</caption><thead><tr><th scope="col">Hull</th><th scope="col" class="figure">Passages</th><th scope="col" class="figure">Factor</th><th scope="col" class="figure">95 % interval</th><th scope="col" class="figure">Weight of the common factor</th></tr></thead><tbody>${rows}</tbody></table>`
}

function restNote(shown: number, all: number): Markup | undefined {
  return all > shown
    ? markup`<p class="muted">The first ${count(shown)} of ${count(all)} are listed; the calibration itself holds them all.</p>`
    : undefined
}

export function outliersTable({ fit }: CalibrationView): Markup {
  const shown = fit.outliers.slice(0, MOST_ROWS)
  if (shown.length === 0) return markup`<p>No passage stands out.</p>`
  const rows = shown.map(
    ({ index, label, logResidual: own, reason }) =>
      markup`<tr><th scope="row">${label ?? `index ${index}`}</th><td class="figure" data-name="index">${String(index)}</td><td class="figure" data-name="log residual">${figure(own, 2)}</td><td class="figure" data-name="as a ratio">${Number.isFinite(own) ? `×${figure(Math.exp(own), 2)}` : UNKNOWN}</td><td class="whole">${reason}</td></tr>`,
  )
  return markup`<table class="stack"><caption><b>Table 3.</b> Outliers, left out of the factor, the scatter and the trends. Look into each before relying on the factor. The index counts rows from 0.</caption><thead><tr><th scope="col">Passage</th><th scope="col" class="figure">Index</th><th scope="col" class="figure">Log residual</th><th scope="col" class="figure">As a ratio</th><th scope="col">Reason</th></tr></thead><tbody>${rows}</tbody></table>${restNote(shown.length, fit.outliers.length)}`
}

const STANDINGS: Readonly<Record<Standing, string>> = {
  counts: 'in the fit',
  outlier: 'outlier',
  'out-of-range': 'out of range',
}

function passageRow(point: CalibrationPoint, method: ChosenMethod | undefined): Markup {
  const { index, label, hull, speed, distance, depth, measured } = point
  const own = method && computedHeight(point, method.id)
  const corrected = own === undefined ? undefined : own * factorOf(method?.fit)
  return markup`<tr><td class="figure" data-name="index">${String(index)}</td><th scope="row">${label ?? UNKNOWN}</th><td data-name="hull">${hull}</td><td class="figure" data-name="speed, km/h">${figure(toKmh(speed), 2)}</td><td class="figure" data-name="distance, m">${figure(distance, 1)}</td><td class="figure" data-name="depth, m">${figure(depth, 2)}</td><td class="figure" data-name="measured, m">${figure(measured, 3)}</td><td class="figure" data-name="computed, m">${figure(own, 3)}</td><td class="figure" data-name="with factor, m">${figure(corrected, 3)}</td><td class="figure" data-name="log residual">${figure(method && logResidual(point, method), 2)}</td><td data-name="standing">${method ? STANDINGS[standingOf(point, method)] : UNKNOWN}</td></tr>`
}

export function passagesTable(view: CalibrationView): Markup {
  const method = chosenMethod(view)
  const shown = view.points.slice(0, MOST_ROWS)
  const by = method ? ` by ${methodShortName(method.id)}` : ''
  const head = markup`<tr><th scope="col" class="figure">Index</th><th scope="col">Passage</th><th scope="col">Hull</th><th scope="col" class="figure">Speed,<br>km/h</th><th scope="col" class="figure">Distance,<br>m</th><th scope="col" class="figure">Depth,<br>m</th><th scope="col" class="figure">Measured,<br>m</th><th scope="col" class="figure">Computed,<br>m</th><th scope="col" class="figure">With<br>factor, m</th><th scope="col" class="figure">Log<br>residual</th><th scope="col">Standing</th></tr>`
  return markup`<table class="stack passages"><caption><b>Table 4.</b> Passages with the height computed${by}, as published and with the common factor. Speed through the water; distance from the gauge to the sailing line.</caption><thead>${head}</thead><tbody>${shown.map((point) => passageRow(point, method))}</tbody></table>${restNote(shown.length, view.points.length)}`
}

/** Cautions, the gravest first. */
export function calibrationCautions({ cautions }: CalibrationView): Markup {
  if (cautions.length === 0) return markup`<p>None.</p>`
  return markup`<ul class="cautions">${[...SEVERITIES]
    .reverse()
    .flatMap((severity) =>
      cautions
        .filter((caution) => caution.severity === severity)
        .map(
          ({ code, text }) =>
            markup`<li class="${severity}"><b>${SEVERITY_NAMES[severity]}</b><div>${text} <small>${code}</small></div></li>`,
        ),
    )}</ul>`
}
