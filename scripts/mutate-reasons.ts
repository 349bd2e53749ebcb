/** Why a number of src/hydro may be a per cent off without a test that fails. */
interface Reason {
  /** below src/hydro */
  readonly file: string
  /** part of the line that the number stands on */
  readonly text: string
  /** the number as written; absent: every number of the line */
  readonly literal?: string
  readonly reason: string
}

const STEPS = 'a count of steps: one more than needed changes no digit'
const START = 'a start for an iteration that converges to the last digits from anywhere near'
const CHANGEOVER = 'where two forms change over that agree to the last digits on both sides'
const MARGIN = 'spares work well below a bound: a margin a per cent wider or narrower changes no answer'
const PACE = 'decides how fast the iteration closes its bracket, not where'

export const REASONS: readonly Reason[] = [
  { file: 'caustic.ts', text: 'DEEP_WAVE_NUMBER = 24', reason: CHANGEOVER },
  { file: 'caustic.ts', text: 'SERIES_BELOW = 1', reason: CHANGEOVER },
  { file: 'caustic.ts', text: 'START_FROUDE = 0.5', reason: START },
  { file: 'caustic.ts', text: 'CUSP_STEPS = 3', reason: STEPS },
  {
    file: 'caustic.ts',
    text: '(1 + (q / 210) * (1 + q / 272))',
    literal: '272',
    reason:
      'the last term of a series, 1.7e-14 of its sum at s = 1, where it is largest: a per cent of it is a rounding',
  },
  {
    file: 'caustic.ts',
    text: '(1 + (q / 180) * (1 + q / 238))',
    literal: '238',
    reason:
      'the last term of a series, 1.4e-13 of its sum at s = 1, where it is largest: a per cent of it is 6 units in the last place there, less than the tests of the caustic allow',
  },
  { file: 'caustic.ts', text: 'e * (4.55 + e *', reason: START },
  { file: 'dispersion.ts', text: 'DEEP_WAVE_NUMBER = 19', reason: CHANGEOVER },
  { file: 'dispersion.ts', text: 'DISPERSION_STEPS = 3', reason: STEPS },
  { file: 'dispersion.ts', text: 'LONG_WAVE_DEFICIT = 1e-4', reason: CHANGEOVER },
  { file: 'dispersion.ts', text: 'SPEED_STEPS = 4', reason: STEPS },
  {
    file: 'dispersion.ts',
    text: 'if (!(f2 >= 0 && f2 <= 1)) return NaN',
    literal: '1',
    reason: 'just above 1 the root of a negative number is NaN as well',
  },
  { file: 'dispersion.ts', text: 'f2 * DEEP_WAVE_NUMBER <= 1', literal: '1', reason: CHANGEOVER },
  { file: 'dispersion.ts', text: 'let p = Math.sqrt(e * (3 - e *', reason: START },
  { file: 'primary-wave.ts', text: 'highest(excess, (critical * (i - 2))', literal: '2', reason: START },
  { file: 'primary-wave.ts', text: '0.382 * (b - a)', reason: PACE },
  { file: 'root.ts', text: 'let step = 0.5', reason: PACE },
  { file: 'root.ts', text: 'const margin = Math.min(0.5', literal: '0.5', reason: PACE },
  { file: 'root.ts', text: 'if (!(phi * phi < xi', reason: PACE },
  { file: 'squat/romisch-1989.ts', text: 'MOST_STEPS = 60', reason: STEPS },
  { file: 'squat/romisch-1989.ts', text: 'SURELY_BELOW = 1e-9', reason: MARGIN },
  { file: 'squat/romisch-1989.ts', text: 'let high = c < 1', reason: START },
  { file: 'squat/romisch-1989.ts', text: 'const slope = SPEED_FACTOR', reason: PACE },
  {
    file: 'squat/tuck.ts',
    text: 'return f2 < 1 ?',
    literal: '1',
    reason: 'just above 1 the root of a negative number is NaN as well',
  },
  { file: 'waves/weggel-sorensen-1986.ts', text: 'SURELY_BELOW = 1e-9', reason: MARGIN },
  {
    file: 'waves/weggel-sorensen-1986.ts',
    text: 'Math.min(0.1 * DEPTH_CAP_FROUDE',
    literal: '2',
    reason: START,
  },
  {
    file: 'waves/weggel-sorensen-1986.ts',
    text: 'Math.min(0.1 * DEPTH_CAP_FROUDE',
    literal: '0.1',
    reason: START,
  },
]
