import type { MethodFit } from '../../src/calibration/measurement.ts'
import type { CalibrationPoint, CalibrationView } from '../../src/report/calibration-view.ts'

/** Hull (d, p), speed km/h, distance m, depth m, computed m by the first method, measured m: an invented day of gauging. */
const ROWS = [
  ['d', 7.1, 14, 2.9, 0.062, 0.044],
  ['d', 7.6, 22, 2.9, 0.071, 0.06],
  ['d', 8.2, 14, 2.9, 0.104, 0.071],
  ['d', 8.3, 30, 2.9, 0.082, 0.064],
  ['d', 8.9, 14, 3, 0.142, 0.105],
  ['d', 9, 22, 3, 0.121, 0.079],
  ['d', 9.4, 18, 3, 0.151, 0.119],
  ['d', 9.7, 14, 3, 0.182, 0.129],
  ['d', 9.8, 30, 3, 0.139, 0.094],
  ['d', 10.1, 22, 3, 0.174, 0.13],
  ['d', 10.3, 14, 3, 0.217, 0.391],
  ['d', 10.4, 18, 3.1, 0.203, 0.137],
  ['d', 10.8, 14, 3.1, 0.253, 0.188],
  ['d', 11, 30, 3.1, 0.188, 0.151],
  ['d', 11.2, 22, 3.1, 0.229, 0.158],
  ['d', 11.5, 14, 3.1, 0.301, 0.241],
  ['p', 18.4, 14, 2.9, 0.31, 0.268],
  ['p', 20.2, 22, 2.9, 0.262, 0.212],
  ['p', 22.5, 14, 3, 0.297, 0.262],
  ['p', 24.1, 30, 3, 0.214, 0.168],
  ['p', 26.3, 18, 3, 0.255, 0.226],
  ['p', 28, 22, 3.1, 0.228, 0.181],
  ['p', 31.2, 14, 3.1, NaN, 0.239],
  ['p', 33.6, 30, 3.1, 0.171, 0.149],
] as const

const points = ROWS.map(([hull, speed, distance, depth, computed, measured], index): CalibrationPoint => ({
  index,
  label: index === 10 ? 'Harrow Pride with tow' : `run ${index + 1}`,
  hull: hull === 'd' ? 'displacement' : 'planing',
  speed: speed / 3.6,
  distance,
  depth,
  measured,
  computed: {
    'kriebel-seelig-2005': computed,
    'gates-herbich-1977': 1.6 * measured * (1 + 0.2 * Math.sin(index)),
    'blaauw-1984': hull === 'p' ? NaN : 2.1 * computed,
    'maynord-2005': hull === 'p' ? 1.3 * computed : NaN,
    'weggel-sorensen-1986': 0.9 * computed,
  },
  isInRange: {
    'kriebel-seelig-2005': Number.isFinite(computed) && index !== 23,
    'gates-herbich-1977': index % 3 !== 0,
    'blaauw-1984': hull === 'd',
    'maynord-2005': hull === 'p' && Number.isFinite(computed),
    'weggel-sorensen-1986': index < 3,
  },
  isOutlier: index === 10,
}))

const none = { slope: 0.12, pValue: 0.41, isFlagged: false }

const kriebel: MethodFit = {
  id: 'kriebel-seelig-2005',
  rank: 1,
  passagesInRange: 22,
  factor: 0.749,
  factorMaximumLikelihood: 0.761,
  interval: [0.704, 0.812],
  scatterLogSd: 0.092,
  biasBeforeLog: -0.289,
  scatterBeforeLogSd: 0.091,
  trend: {
    speed: { slope: 0.153, pValue: 0.0042, isFlagged: true },
    distance: { slope: -0.047, pValue: 0.391, isFlagged: false },
    depth: none,
  },
  crossValidatedLogError: 0.097,
  byHull: [
    { hull: 'displacement', passages: 15, factor: 0.731, interval: [0.693, 0.771], pooledWeight: 0.22 },
    { hull: 'planing', passages: 6, factor: 0.833, interval: [0.781, 0.889], pooledWeight: 0.37 },
  ],
}

const blaauw: MethodFit = {
  ...kriebel,
  id: 'blaauw-1984',
  rank: 2,
  passagesInRange: 16,
  factor: 0.348,
  interval: [0.331, 0.369],
  scatterLogSd: 0.103,
  biasBeforeLog: -1.055,
  crossValidatedLogError: 0.108,
  trend: { speed: none, distance: none, depth: { slope: 1.7, pValue: 0.0004, isFlagged: true } },
  byHull: [],
}

const gates: MethodFit = {
  ...kriebel,
  id: 'gates-herbich-1977',
  rank: 3,
  passagesInRange: 16,
  factor: 0.631,
  interval: [0.571, 0.722],
  scatterLogSd: 0.163,
  biasBeforeLog: -0.464,
  crossValidatedLogError: 0.172,
  trend: { speed: none, distance: none, depth: none },
}

/** Gauging on an invented water: 24 passages, two hulls, one outlier, one height that cannot be computed. */
export const harrowmere: CalibrationView = {
  id: 'b1946ac9-2d4f-4c3a-9d5e-7a0c5d0a6f11',
  name: 'Harrowmere Navigation, gauging of May 2025',
  segmentId: 'harrow-town-reach',
  created: '2025-06-02T09:30:00Z',
  points,
  fit: {
    methods: [blaauw, kriebel, gates],
    recommended: 'kriebel-seelig-2005',
    isDistinguishable: false,
    outliers: [
      {
        index: 10,
        label: 'Harrow Pride with tow',
        logResidual: 0.878,
        reason: 'more than 3.5 robust standard deviations above the factor',
      },
    ],
  },
  coverage: {
    speed: [7.1 / 3.6, 33.6 / 3.6],
    distance: [14, 30],
    depth: [2.9, 3.1],
    depthFroudeNumber: [0.37, 1.69],
  },
  cautions: [
    {
      code: 'local-rules-apply',
      severity: 'info',
      text: 'Local rules, posted signs and the judgement of licensed navigators and engineers come first.',
    },
    {
      code: 'trend-left',
      severity: 'warning',
      text: 'Residuals of the recommended method rise with speed: the factor is too small for fast vessels.',
    },
    {
      code: 'methods-alike',
      severity: 'caution',
      text: 'The data do not tell the two best methods apart.',
    },
  ],
  serviceVersion: '1.3.0',
  methodVersion: '2',
  seed: 41,
}

const bare: MethodFit = {
  ...kriebel,
  passagesInRange: 5,
  interval: [NaN, NaN],
  scatterLogSd: NaN,
  crossValidatedLogError: NaN,
  biasBeforeLog: NaN,
  trend: {
    speed: { slope: NaN, pValue: NaN, isFlagged: false },
    distance: { slope: NaN, pValue: NaN, isFlagged: false },
    depth: { slope: NaN, pValue: NaN, isFlagged: false },
  },
  byHull: [],
}

const five = points
  .slice(0, 5)
  .map((point) => ({ ...point, label: undefined, speed: 2.5, distance: 14, depth: 2.9 }))

/** A long name without a place to break. */
const LONG = 'Oberwasserstraßenschifffahrtsamtsbezirksgrenzabschnitt'

/** Calibrations that ask something of the pictures. */
export const VIEWS: Readonly<Record<string, CalibrationView>> = {
  'two hulls with an outlier': harrowmere,
  'another method first, depth flagged': {
    ...harrowmere,
    fit: { ...harrowmere.fit, recommended: 'blaauw-1984', isDistinguishable: true },
  },
  'five alike passages': {
    ...harrowmere,
    segmentId: undefined,
    points: five,
    fit: { methods: [bare], recommended: bare.id, isDistinguishable: false, outliers: [] },
    coverage: { speed: [2.5, 2.5], distance: [14, 14], depth: [2.9, 2.9], depthFroudeNumber: [0.47, 0.47] },
    cautions: [],
  },
  'no method with a factor': {
    ...harrowmere,
    fit: { methods: [], recommended: undefined, isDistinguishable: false, outliers: [] },
  },
  'nothing computed': {
    ...harrowmere,
    points: points.map((point) => ({ ...point, computed: {}, isInRange: {}, isOutlier: false })),
    fit: { methods: [], recommended: undefined, isDistinguishable: false, outliers: [] },
    coverage: {
      speed: [Infinity, -Infinity],
      distance: [NaN, NaN],
      depth: [NaN, NaN],
      depthFroudeNumber: [NaN, NaN],
    },
  },
  'three hulls, long names and many outliers': {
    ...harrowmere,
    name: `${LONG} ${LONG}`,
    segmentId: LONG.toLowerCase().replace('ß', 'ss').repeat(2),
    points: points.map((point) => ({
      ...point,
      label: `${LONG} ${point.index}`,
      hull: point.index % 5 === 0 ? 'semi-displacement' : point.hull,
      measured: point.index % 6 === 4 ? 4 * point.measured : point.measured,
      isOutlier: point.index % 6 === 4 || point.isOutlier,
    })),
    fit: {
      ...harrowmere.fit,
      methods: [
        {
          ...kriebel,
          trend: {
            speed: { slope: 0.4, pValue: 0.0001, isFlagged: true },
            distance: { slope: -0.3, pValue: 0.004, isFlagged: true },
            depth: { slope: 1.9, pValue: 0.012, isFlagged: true },
          },
          byHull: [
            ...kriebel.byHull,
            { hull: 'semi-displacement', passages: 5, factor: 0.76, interval: [0.7, 0.83], pooledWeight: 1 },
          ],
        },
        blaauw,
      ],
      outliers: [4, 10, 16, 22].map((index) => ({
        index,
        label: `${LONG} ${index}`,
        logResidual: 1.31,
        reason: `${LONG}: far above the factor`,
      })),
    },
  },
}
