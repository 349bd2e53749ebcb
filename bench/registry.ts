import { rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { answersOf } from '../src/http/layer.ts'
import { readFeature } from '../src/http/feature-in.ts'
import { toConditions, toOptions } from '../src/http/options.schema.ts'
import { toVessel } from '../src/http/vessel.schema.ts'
import { openStore } from '../src/store/open.ts'
import type { SegmentContent } from '../src/store/registry.ts'

const SEGMENTS = 10_000

/** Invented segments side by side, each a little different. */
function contents(): SegmentContent[] {
  return Array.from({ length: SEGMENTS }, (_, i) => {
    const lon = 3 + (i % 100) * 0.02
    const lat = 54 + Math.floor(i / 100) * 0.01
    const coordinates = [
      [lon, lat],
      [lon + 0.006, lat + 0.001],
      [lon + 0.012, lat],
    ]
    const properties = {
      waterway: 'Invented Navigation',
      gauge_id: `gauge-${i % 10}`,
      depth_m: 3 + (i % 50) / 10,
      width_m: 30 + (i % 70),
      bank_distance_m: 12 + (i % 10) / 10,
    }
    const geometry = { type: 'LineString', coordinates }
    const id = `segment-${String(i).padStart(5, '0')}`
    const { content } = readFeature({ type: 'Feature', id, geometry, properties }, '#', false)
    if (!content) throw new Error('The invented segment cannot be read')
    return content
  })
}

const cpuSeconds = (): number => {
  const { user, system } = process.cpuUsage()
  return (user + system) / 1e6
}

/** What 10,000 segments cost: to import, to open, to answer as a layer, and to look whether anything changed. */
export async function registryRows(): Promise<{ what: string; value: string; bar: string }[]> {
  const file = join(tmpdir(), `washlimit-bench-${process.pid}.db`)
  const time = '2026-01-01T00:00:00Z'
  try {
    const writer = await openStore(`sqlite:${file}`)
    const all = contents()
    const beforeImport = performance.now()
    await writer.importSegments(all, { time })
    const imported = performance.now() - beforeImport
    await writer.close()

    const beforeOpen = performance.now()
    const store = await openStore(`sqlite:${file}`)
    const registry = await store.current()
    const opened = performance.now() - beforeOpen

    const asked = {
      vessel: toVessel({ class: 'cemt-iii' }, registry),
      conditions: toConditions({}, registry),
      options: toOptions({}),
    }
    const watch = { advised: () => undefined, row: () => undefined }
    await answersOf(registry.segments(), asked, registry, watch)
    const cpuBefore = cpuSeconds()
    const answers = await answersOf(registry.segments(), asked, registry, watch)
    const layer = cpuSeconds() - cpuBefore
    const fewBefore = cpuSeconds()
    const few = await answersOf(registry.segments().slice(0, SEGMENTS / 10), asked, registry, watch)
    const fewer = cpuSeconds() - fewBefore

    const beforeLooks = performance.now()
    for (let i = 0; i < 10_000; i += 1) await store.current()
    const look = (performance.now() - beforeLooks) / 10
    await store.close()
    return [
      { what: `import of ${SEGMENTS} segments, SQLite`, value: `${imported.toFixed(0)} ms`, bar: '' },
      { what: `opening a registry of ${SEGMENTS} segments`, value: `${opened.toFixed(0)} ms`, bar: '' },
      { what: `layer of ${answers.length} segments, CPU`, value: `${layer.toFixed(2)} s`, bar: '1 s' },
      {
        what: `layer, CPU a segment with ${few.length} and with ${answers.length}`,
        value: `${((fewer / few.length) * 1e6).toFixed(0)} us, ${((layer / answers.length) * 1e6).toFixed(0)} us`,
        bar: 'alike: linear',
      },
      { what: 'looking whether anything changed', value: `${look.toFixed(1)} us`, bar: '' },
    ]
  } finally {
    for (const end of ['', '-wal', '-shm']) rmSync(`${file}${end}`, { force: true })
  }
}
