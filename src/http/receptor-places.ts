import type { FaultItem } from '../domain/fault.ts'
import type { ChainageScale } from '../geo/chainage-scale.ts'
import type { RegistrySegmentWire } from './segment.schema.ts'

/** Slack of the ends of a segment for receptors, m, as for stations. */
const END_SLACK = 1

type Scale = Pick<ChainageScale, 'distanceAt' | 'chainageAt'>

/** Places of the receptors that have one, m along the sailing line. */
export function wantedPlaces(wire: RegistrySegmentWire, scale: Scale, length: number): number[] {
  return (wire.receptors ?? []).flatMap(({ chainage_m: chainage }) =>
    chainage === undefined ? [] : [Math.min(length, Math.max(0, scale.distanceAt(chainage)))],
  )
}

/** Receptors whose chainage lies outside the segment. */
export function receptorItems(wire: RegistrySegmentWire, scale: Scale, length: number): FaultItem[] {
  const [from, to] = [scale.chainageAt(0), scale.chainageAt(length)]
  return (wire.receptors ?? []).flatMap(({ chainage_m: chainage }, i): FaultItem[] => {
    if (chainage === undefined) return []
    const along = scale.distanceAt(chainage)
    if (along >= -END_SLACK && along <= length + END_SLACK) return []
    return [
      {
        pointer: `#/segment/receptors/${i}/chainage_m`,
        code: 'clash',
        detail: `The receptor lies outside the segment, which runs from chainage ${from.toFixed(0)} m to ${to.toFixed(0)} m: give it to the segment that it lies on, or leave the chainage out to have it count all along`,
        facts: { chainage_m: chainage, chainage_from_m: from, chainage_to_m: to },
      },
    ]
  })
}
