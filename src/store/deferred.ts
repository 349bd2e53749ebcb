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
    close: async () => {
      const store = await opened.catch(() => undefined)
      await store?.close()
    },
  }
}
