import type { Vessel } from '../domain/vessel.ts'
import type { StudySegment } from '../limits/study.ts'
import type { Register } from './evidence-register.ts'
import { vesselsOf } from './evidence-strip-rows.ts'
import type { EvidenceView } from './evidence-view.ts'
import { runsText, vesselName } from './evidence-words.ts'
import { figure, kmh, length, metres } from './format.ts'
import { markup, type Markup } from './html.ts'
import { fieldName, valueText } from './sheet-tables.ts'
import { BANK_KIND_NAMES, HULL_NAMES, SEVERITY_NAMES } from './words.ts'

const stretchNumbers = (indices: readonly number[]): string => runsText(indices.map((index) => index + 1))

function cautionsAnnex({ cautions }: Register): Markup {
  if (cautions.length === 0) return markup`<p>No cautions.</p>`
  return markup`<table class="cautions"><thead><tr><th scope="col" class="figure">No.</th><th scope="col">Severity</th><th scope="col">Caution</th><th scope="col">Stretches</th></tr></thead><tbody>${cautions.map(
    ({ severity, text, code, stretches }, i) =>
      markup`<tr><th scope="row" class="figure">${String(i + 1)}</th><td class="severity ${severity}"><b>${SEVERITY_NAMES[severity]}</b></td><td>${text} <span class="muted">${code}</span></td><td>${stretchNumbers(stretches)}</td></tr>`,
  )}</tbody></table>`
}

function assumptionsAnnex({ assumptions }: Register): Markup {
  if (assumptions.length === 0) return markup`<p>No assumptions.</p>`
  return markup`<table class="assumed"><thead><tr><th scope="col" class="figure">No.</th><th scope="col">Field</th><th scope="col">Value</th><th scope="col">Meaning</th><th scope="col">Source</th><th scope="col">Stretches</th></tr></thead><tbody>${assumptions.map(
    ({ field, value, text, source, stretches }, i) =>
      markup`<tr><th scope="row" class="figure">${String(i + 1)}</th><td>${fieldName(field)}</td><td>${valueText(value)}</td><td>${text}</td><td>${source}</td><td>${stretchNumbers(stretches)}</td></tr>`,
  )}</tbody></table>`
}

function vesselRow(vessel: Vessel): Markup {
  const { hull, beam, draught, blockCoefficient, maxSpeed, minSteerageSpeed } = vessel
  return markup`<tr><th scope="row">${vesselName(vessel)}</th><td>${HULL_NAMES[hull].replace(' hull', '')}</td><td class="figure">${length(vessel.length)}</td><td class="figure">${length(beam)}</td><td class="figure">${length(draught)}</td><td class="figure">${figure(blockCoefficient, 2)}</td><td class="figure">${kmh(minSteerageSpeed)}</td><td class="figure">${kmh(maxSpeed)}</td></tr>`
}

function vesselRows(name: string, vessels: readonly (Vessel | undefined)[]): Markup {
  return markup`<tr class="part"><th scope="rowgroup" colspan="8">${name}</th></tr>${
    vessels.length === 0
      ? markup`<tr><td colspan="8">none</td></tr>`
      : vessels.map((vessel) => vessel && vesselRow(vessel))
  }`
}

function vesselsAnnex(view: EvidenceView): Markup {
  const { study, rules, plan } = view
  const groups = rules.groups.map(({ id, name }) =>
    vesselRows(
      name,
      vesselsOf(view, id).map((index) => study.vessels[index]),
    ),
  )
  const rest = plan.unassignedVessels.map((index) => study.vessels[index])
  return markup`<table class="vessels"><caption>Speeds through the water. Draught before the permitted draught of a segment caps it.</caption><thead><tr><th scope="col">Vessel</th><th scope="col">Hull</th><th scope="col" class="figure">Length</th><th scope="col" class="figure">Beam</th><th scope="col" class="figure">Draught</th><th scope="col" class="figure">Block coeff.</th><th scope="col" class="figure">Steers from</th><th scope="col" class="figure">Top speed</th></tr></thead><tbody>${groups}${vesselRows('In no group: no limit is drawn for them', rest)}</tbody></table>`
}

/** Least and greatest of a figure along a segment, m. */
function extentText(values: readonly number[]): string {
  const [least, most] = [Math.min(...values), Math.max(...values)]
  const [first, last] = [figure(least, 2), metres(most)]
  return first === figure(most, 2) ? last : `${first} to ${last}`
}

function segmentRow({ id, chainageFrom, chainageTo, segment, options }: StudySegment): Markup {
  const { stations, banks, name } = segment
  const km = (value: number): string => figure(value / 1000, 3)
  const calibration =
    options.waveFactor === undefined
      ? (options.calibration?.name ?? 'none')
      : `factor ${figure(options.waveFactor, 2)}`
  return markup`<tr><th scope="row">${name ?? id}${name !== undefined && markup`<br><span class="muted">${id}</span>`}</th><td class="figure">${km(chainageFrom)}<br>${km(chainageTo)}</td><td class="figure">${extentText(stations.map(({ depth }) => depth))}</td><td class="figure">${extentText(stations.map(({ width }) => width))}</td><td class="figure">${extentText(stations.flatMap(({ distances }) => distances))}</td><td>${banks.map(({ side, kind }) => `${side}: ${BANK_KIND_NAMES[kind]}`).join('; ')}${segment.confinement === 'open' && '; open water'}</td><td>${calibration}</td></tr>`
}

function segmentsAnnex({ study }: EvidenceView): Markup {
  const byWaterway = new Map<string, StudySegment[]>()
  for (const segment of study.segments) {
    const name = segment.waterway ?? 'Without a waterway'
    byWaterway.set(name, [...(byWaterway.get(name) ?? []), segment])
  }
  const rows = [...byWaterway].map(([name, segments]) => {
    const isFalling = segments.some(({ chainageFrom, chainageTo }) => chainageTo < chainageFrom)
    const sorted = [...segments].sort((a, b) =>
      isFalling ? b.chainageFrom - a.chainageFrom : a.chainageFrom - b.chainageFrom,
    )
    return markup`<tr class="part"><th scope="rowgroup" colspan="7">${name}</th></tr>${sorted.map(segmentRow)}`
  })
  return markup`<table class="segments"><caption>As they were when the study was made, from upstream; depth and width at the datum; with stations their least and greatest figures.</caption><thead><tr><th scope="col">Segment</th><th scope="col" class="figure">km</th><th scope="col" class="figure">Depth</th><th scope="col" class="figure">Width</th><th scope="col" class="figure">To the banks</th><th scope="col">Banks</th><th scope="col">Calibration</th></tr></thead><tbody>${rows}</tbody></table>`
}

function methodsAnnex({
  methods,
  serviceVersion,
  methodVersion,
  made,
  publication: own,
}: EvidenceView): Markup {
  const versions = own
    ? `The plan was published with service ${own.serviceVersion} and methods ${own.methodVersion}. `
    : ''
  return markup`<table class="methods"><caption>Published methods behind the figures. A mark † says that the coefficients were recalled from the publication, which was not read again.</caption><thead><tr><th scope="col">Method</th><th scope="col">Reference</th></tr></thead><tbody>${methods.map(
    ({ id, name, reference, isFromMemory }) =>
      markup`<tr><th scope="row">${name}${isFromMemory && ' †'} <span class="muted">${id}</span></th><td>${reference}</td></tr>`,
  )}</tbody></table><p class="after-table">${versions}This document was made with service ${serviceVersion} and methods ${methodVersion}, ${made}.</p>`
}

/** Everything that the sheets refer to. */
export function annexes(view: EvidenceView, register: Register): Markup {
  const part = (id: string, title: string, content: Markup): Markup =>
    markup`<div class="annex" id="annex-${id.toLowerCase()}"><h2>Annex ${id} ${title}</h2>${content}</div>`
  return markup`<section class="paper annexes">${[
    part('A', 'Cautions', cautionsAnnex(register)),
    part('B', 'Assumptions', assumptionsAnnex(register)),
    part('C', 'Vessels', vesselsAnnex(view)),
    part('D', 'Segments', segmentsAnnex(view)),
    part('E', 'Methods and versions', methodsAnnex(view)),
  ]}</section>`
}
