import fc from 'fast-check'
import { expect, it } from 'vitest'
import { decide } from '../../src/advisory/decide.ts'
import { govern } from '../../src/advisory/govern.ts'
import { cases, ifPossible } from '../support/arbitraries.ts'

it('finds what every bound together leaves, to the last digit', () => {
  fc.assert(
    fc.property(cases({ stations: 1 }), ({ segment, vessel, conditions, options }) => {
      const [station] = segment.stations
      const alone = { ...segment, stations: [station] as const }
      const whole = ifPossible(() => decide(alone, vessel, conditions, options).main)
      const lean = ifPossible(() => govern(alone, station, vessel, conditions, options))
      expect(lean?.outcome).toBe(whole?.outcome)
      expect(lean?.speed).toBe(whole?.speed)
      expect(lean?.overGround).toBe(whole?.overGround)
      expect(lean?.direction).toBe(whole?.direction)
      expect(lean?.governing.criterion.id).toBe(whole?.governing.criterion.id)
      expect(lean?.governing.criterion.place).toBe(whole?.governing.criterion.place)
    }),
    { numRuns: 600 },
  )
})
