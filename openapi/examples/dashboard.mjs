// Polls the service as a port authority's dashboard does: one layer for each gauge and class of vessels, asked for only
// when something changed, and prints the segments whose advice is another than before.
//
//   node openapi/examples/dashboard.mjs [--url http://127.0.0.1:8080] [--every 5] [--rounds 3]
//     [--classes cemt-iv,recreational-rb] [--levels upper-harrow=0.15,lower-harrow=-0.30] [--key KEY]
//
// Levels are what the gauges read, m above the datum of the segments that name them. Without --levels every gauge that
// the registry names is taken at 0.

import { parseArgs } from 'node:util'
import { setTimeout as pause } from 'node:timers/promises'

const { values } = parseArgs({
  options: {
    url: { type: 'string', default: 'http://127.0.0.1:8080' },
    every: { type: 'string', default: '5' },
    rounds: { type: 'string', default: '3' },
    classes: { type: 'string', default: 'cemt-iv,recreational-rb' },
    levels: { type: 'string', default: '' },
    key: { type: 'string' },
  },
})

const headers = values.key === undefined ? {} : { authorization: `Bearer ${values.key}` }

async function get(path, etag) {
  const reply = await fetch(new URL(path, values.url), {
    headers: { ...headers, ...(etag && { 'if-none-match': etag }) },
  })
  if (reply.status === 304) return undefined
  const body = await reply.json()
  if (!reply.ok) throw new Error(`${path}: ${body.detail}`)
  return { etag: reply.headers.get('etag'), body }
}

/** Every gauge that a segment names, page by page. */
async function gauges() {
  const found = new Set()
  let path = '/v1/segments?limit=1000'
  while (path) {
    const { body } = await get(path)
    for (const { properties } of body.features) if (properties.gauge_id) found.add(properties.gauge_id)
    path = body.links.find(({ rel }) => rel === 'next')?.href
  }
  return [...found].sort()
}

const readings = new Map(
  values.levels
    .split(',')
    .filter(Boolean)
    .map((reading) => reading.split('=')),
)

/** A maximum with one decimal, rounded down: what is shown is never more than what was found. */
const atMost = (speed) => (Math.floor(speed * 10 + 1e-9) / 10).toFixed(1)

/** What a board shows for a segment. */
function shown({ outcome, sign_value, sign_unit, max_over_ground_kmh, problem_detail }) {
  if (problem_detail) return `no answer (${problem_detail})`
  if (outcome === 'no-safe-speed') return 'no safe speed'
  return sign_value === null ? `${atMost(max_over_ground_kmh)} km/h, no sign` : `${sign_value} ${sign_unit}`
}

const etags = new Map()
const boards = new Map()
const names = await gauges()

for (let round = 1; round <= Number(values.rounds); round += 1) {
  let asked = 0
  let unchanged = 0
  for (const gauge of names) {
    for (const vesselClass of values.classes.split(',')) {
      const query = new URLSearchParams({
        vessel_class: vesselClass,
        gauge_id: gauge,
        water_level_m: readings.get(gauge) ?? '0',
      })
      const path = `/v1/advisories.geojson?${query}`
      asked += 1
      const answer = await get(path, etags.get(path))
      if (!answer) {
        unchanged += 1
        continue
      }
      etags.set(path, answer.etag)
      for (const { id, properties } of answer.body.features) {
        const board = `${id} ${vesselClass}`
        const text = shown(properties)
        if (boards.get(board) !== text)
          console.log(`${board.padEnd(48)} ${text} (${properties.governing_criterion ?? '-'})`)
        boards.set(board, text)
      }
    }
  }
  console.log(`round ${round}: ${asked} layers asked for, ${unchanged} unchanged, ${boards.size} boards`)
  if (round < Number(values.rounds)) await pause(Number(values.every) * 1000)
}
console.log('Computed advisories, not orders: local rules and licensed practice come first.')
