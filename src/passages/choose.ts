import type { Candidate } from './fairway-network.ts'

/** A fairway takes over, or is the only one in question, when it scores below this share of another: own choice. */
const BETTER_SHARE = 0.6

/** Added to both scores compared, so that metres beside the axis of one decide nothing: own choice, 0.22 of the way to the bank. */
const SCORE_NOISE = 0.05

/** Reports in a row after which a fairway that does not touch the current one takes over: own choice. */
const TAKE_OVER_REPORTS = 3

/** What is known of a vessel's way so far: lines by their place in the list of fairways, -1 for none. */
export interface Route {
  readonly line: number
  /** the line that would take over, and for how many reports in a row by now */
  readonly challenger: number
  readonly challenges: number
}

/** Nothing is known of a vessel's way. */
export const NO_ROUTE: Route = { line: -1, challenger: -1, challenges: 0 }

export interface Choice {
  readonly candidate: Candidate
  /** whether another one is about as likely */
  readonly isDoubtful: boolean
  readonly route: Route
}

type AreTouching = (a: number, b: number) => boolean

function isClearlyBetter(a: Candidate, b: Candidate): boolean {
  return a.score + SCORE_NOISE < BETTER_SHARE * (b.score + SCORE_NOISE)
}

/** The lowest score; of equal ones that of the fairway listed first. */
export function bestOf(candidates: readonly Candidate[]): Candidate | undefined {
  let best: Candidate | undefined
  for (const candidate of candidates) {
    const isBetter =
      !best ||
      candidate.score < best.score ||
      (candidate.score === best.score && candidate.foot.line < best.foot.line)
    if (isBetter) best = candidate
  }
  return best
}

/** Without those that end before the position where one that touches them goes on alongside it. */
export function withoutEnded(
  candidates: readonly Candidate[],
  areTouching: AreTouching,
): readonly Candidate[] {
  if (candidates.length < 2) return candidates
  const goesOn = (ended: Candidate) => (other: Candidate) =>
    other.foot.beyond === 0 && !other.isAcross && areTouching(other.foot.line, ended.foot.line)
  return candidates.filter((candidate) => candidate.foot.beyond === 0 || !candidates.some(goesOn(candidate)))
}

/** The current fairway, or one that touches it when the current one is left or clearly worse. */
function continued(
  candidates: readonly Candidate[],
  { line }: Route,
  areTouching: AreTouching,
): Candidate | undefined {
  const current = candidates.find(({ foot }) => foot.line === line)
  const next = bestOf(
    candidates.filter(
      ({ foot, isAcross }) => !isAcross && foot.line !== line && areTouching(foot.line, line),
    ),
  )
  if (!next || !current) return current ?? next
  // a vessel that turns in a mouth is not yet in it
  const isReached = next.foot.beyond === 0 || current.foot.beyond !== 0
  return isReached && isClearlyBetter(next, current) ? next : current
}

const onto = ({ foot }: Candidate): Route => ({ ...NO_ROUTE, line: foot.line })

/** Without a route: the best, doubtful when one that does not touch it is about as good. */
function first(candidates: readonly Candidate[], route: Route, areTouching: AreTouching): Choice | undefined {
  const best = bestOf(candidates)
  if (!best) return undefined
  const isDoubtful = candidates.some(
    (other) =>
      other !== best && !areTouching(other.foot.line, best.foot.line) && !isClearlyBetter(best, other),
  )
  return { candidate: best, isDoubtful, route: isDoubtful || best.isAcross ? route : onto(best) }
}

/**
 * Which of the fairways around a position the vessel is on.
 *
 * It stays on the current one or goes on to one that touches it, until a third one has been clearly better three times in
 * a row, or once where those end.
 *
 * @param candidates  n ≥ 0, all of them with the position inside
 * @param route      what was known before
 */
export function choose(
  candidates: readonly Candidate[],
  route: Route,
  areTouching: AreTouching,
): Choice | undefined {
  const [only] = candidates
  // the usual case: alone on the way it is on
  if (candidates.length === 1 && only && only.foot.line === route.line) {
    const goesOn = route.challenges === 0 ? route : onto(only)
    return { candidate: only, isDoubtful: false, route: goesOn }
  }
  const known = route.line < 0 ? undefined : continued(candidates, route, areTouching)
  if (!known) return first(candidates, route, areTouching)
  const rival = bestOf(
    candidates.filter(({ foot }) => foot.line !== route.line && !areTouching(foot.line, route.line)),
  )
  if (!rival || !isClearlyBetter(rival, known)) {
    return { candidate: known, isDoubtful: false, route: onto(known) }
  }
  const challenger = rival.foot.line
  const challenges = route.challenger === challenger ? route.challenges + 1 : 1
  const isEnded = known.foot.beyond !== 0 && rival.foot.beyond === 0
  if (isEnded || challenges >= TAKE_OVER_REPORTS)
    return { candidate: rival, isDoubtful: false, route: onto(rival) }
  return { candidate: known, isDoubtful: false, route: { line: known.foot.line, challenger, challenges } }
}
