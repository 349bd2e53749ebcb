import { unavailable } from './faults.ts'
import type { Store } from './registry.ts'

/** A store that is being opened: its calls wait until it is. Why it cannot be is for the log, not for callers. */
export function deferredStore(kind: Store['kind'], opening: Promise<Store>): Store {
  const opened = opening.catch((error: unknown) => {
    throw unavailable(error)
  })
  // told to whoever calls; here it would end the process
  opened.catch(() => undefined)
  return {
    kind,
    current: async () => (await opened).current(),
    putSegment: async (...parameters) => (await opened).putSegment(...parameters),
    deleteSegment: async (...parameters) => (await opened).deleteSegment(...parameters),
    importSegments: async (...parameters) => (await opened).importSegments(...parameters),
    revisions: async (...parameters) => (await opened).revisions(...parameters),
    findRevision: async (...parameters) => (await opened).findRevision(...parameters),
    putClass: async (...parameters) => (await opened).putClass(...parameters),
    deleteClass: async (...parameters) => (await opened).deleteClass(...parameters),
    addCalibration: async (...parameters) => (await opened).addCalibration(...parameters),
    deleteCalibration: async (...parameters) => (await opened).deleteCalibration(...parameters),
    findCalibrationRows: async (...parameters) => (await opened).findCalibrationRows(...parameters),
    findKey: async (...parameters) => (await opened).findKey(...parameters),
    addKey: async (...parameters) => (await opened).addKey(...parameters),
    keys: async () => (await opened).keys(),
    revokeKey: async (...parameters) => (await opened).revokeKey(...parameters),
    addJob: async (...parameters) => (await opened).addJob(...parameters),
    findJob: async (...parameters) => (await opened).findJob(...parameters),
    jobs: async (...parameters) => (await opened).jobs(...parameters),
    unfinishedJobs: async () => (await opened).unfinishedJobs(),
    findVerification: async (...parameters) => (await opened).findVerification(...parameters),
    jobInputs: async (...parameters) => (await opened).jobInputs(...parameters),
    startJob: async (...parameters) => (await opened).startJob(...parameters),
    chunksDone: async (...parameters) => (await opened).chunksDone(...parameters),
    putChunk: async (...parameters) => (await opened).putChunk(...parameters),
    findChunk: async (...parameters) => (await opened).findChunk(...parameters),
    endJob: async (...parameters) => (await opened).endJob(...parameters),
    removeJob: async (...parameters) => (await opened).removeJob(...parameters),
    addPlan: async (...parameters) => (await opened).addPlan(...parameters),
    findPlan: async (...parameters) => (await opened).findPlan(...parameters),
    plans: async (...parameters) => (await opened).plans(...parameters),
    publishPlan: async (...parameters) => (await opened).publishPlan(...parameters),
    findRecord: async (...parameters) => (await opened).findRecord(...parameters),
    deletePlan: async (...parameters) => (await opened).deletePlan(...parameters),
    close: async () => {
      const store = await opened.catch(() => undefined)
      await store?.close()
    },
  }
}
