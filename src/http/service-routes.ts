import { advisoryRoutes } from './advisories.ts'
import { advisoryStreamRoutes } from './advisory-stream.ts'
import type { Routes } from './app-type.ts'
import { calibrationRoutes } from './calibrations.ts'
import { evidenceRoutes } from './evidence.ts'
import { layerRoutes } from './layer.ts'
import { limitPlanRoutes } from './limit-plans.ts'
import { matrixRoutes } from './matrix.ts'
import { methodRoutes } from './methods.ts'
import { overviewRoutes } from './overview.ts'
import { passageColumnRoutes } from './passage-columns.ts'
import { passageRoutes } from './passages.ts'
import { planVerifyRoutes } from './plan-verify.ts'
import { publicationRoutes } from './publication.ts'
import { segmentImportRoutes } from './segment-import.ts'
import { segmentViewRoutes } from './segment-views.ts'
import { segmentWriteRoutes } from './segment-writes.ts'
import { segmentRoutes } from './segments.ts'
import type { Service } from './service.ts'
import { studyRoutes } from './studies.ts'
import { vesselClassRoutes } from './vessel-classes.ts'

/** Every route of the service beside health, problems and documentation. */
export function serviceRoutes(service: Service): Routes[] {
  return [
    advisoryRoutes(service),
    advisoryStreamRoutes(service),
    matrixRoutes(service),
    segmentRoutes(service),
    segmentViewRoutes(service),
    segmentWriteRoutes(service),
    segmentImportRoutes(service),
    passageRoutes(service),
    passageColumnRoutes,
    calibrationRoutes(service),
    studyRoutes(service),
    limitPlanRoutes(service),
    publicationRoutes(service),
    planVerifyRoutes(service),
    evidenceRoutes(service),
    layerRoutes(service),
    vesselClassRoutes(service),
    methodRoutes,
    overviewRoutes(service),
  ]
}
