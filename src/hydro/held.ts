import type { Setting } from './setting.ts'

/**
 * A figure of a setting that laws need at every speed, computed anew only when another setting is asked about.
 * Settings are never changed once made.
 *
 * @example heldFor((setting) => Math.cbrt(setting.volume))
 */
export function heldFor<Figure>(compute: (setting: Setting) => Figure): (setting: Setting) => Figure {
  let held: Setting | undefined
  let figure: Figure
  return (setting) => {
    if (held !== setting) {
      figure = compute(setting)
      held = setting
    }
    return figure
  }
}

/**
 * A figure of something at a speed, computed anew only when something else or another speed is asked about: one answer
 * needs it in several places.
 *
 * @param compute  of what is never changed once made
 * @example heldAt((setting, speed) => meanDrawdown(setting, speed))
 */
export function heldAt<Of extends object, Figure>(
  compute: (of: Of, speed: number) => Figure,
): (of: Of, speed: number) => Figure {
  let held: Of | undefined
  let heldSpeed = NaN
  let figure: Figure
  return (of, speed) => {
    if (held !== of || heldSpeed !== speed) {
      figure = compute(of, speed)
      held = of
      heldSpeed = speed
    }
    return figure
  }
}

interface HeldAtPlace<Of, Figure> {
  readonly of: Of
  readonly speed: number
  readonly place: number
  readonly figure: Figure
}

/** The same at a place beside: the last two are held, as a waterway has two banks. */
export function heldAtPlaces<Of extends object, Figure>(
  compute: (of: Of, speed: number, place: number) => Figure,
): (of: Of, speed: number, place: number) => Figure {
  let last: HeldAtPlace<Of, Figure> | undefined
  let before: HeldAtPlace<Of, Figure> | undefined
  return (of, speed, place) => {
    if (last?.of === of && last.speed === speed && last.place === place) return last.figure
    if (before?.of === of && before.speed === speed && before.place === place) return before.figure
    before = last
    last = { of, speed, place, figure: compute(of, speed, place) }
    return last.figure
  }
}
