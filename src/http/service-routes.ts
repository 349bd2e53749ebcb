import { advisoryRoutes, type AdvisoryParts } from './advisories.ts'
import { advisoryStreamRoutes } from './advisory-stream.ts'
import type { Routes } from './app-type.ts'
import { matrixRoutes } from './matrix.ts'
import { methodRoutes } from './methods.ts'
import { segmentRoutes } from './segments.ts'
import { vesselClassRoutes } from './vessel-classes.ts'

/** Every route of the service beside health, problems and documentation. */
export function serviceRoutes(parts: AdvisoryParts): Routes[] {
  return [
    advisoryRoutes(parts),
    advisoryStreamRoutes(parts),
    matrixRoutes(parts),
    segmentRoutes(parts),
    vesselClassRoutes,
    methodRoutes,
  ]
}
