import type { Store } from './registry.ts'

/** A store that is being opened: its calls wait until it is, and fail as opening it failed. */
export function deferredStore(kind: Store['kind'], opening: Promise<Store>): Store {
  // told to whoever calls; here it would end the process
  opening.catch(() => undefined)
  return {
    kind,
    current: async () => (await opening).current(),
    putSegment: async (...parameters) => (await opening).putSegment(...parameters),
    deleteSegment: async (...parameters) => (await opening).deleteSegment(...parameters),
    importSegments: async (...parameters) => (await opening).importSegments(...parameters),
    revisions: async (...parameters) => (await opening).revisions(...parameters),
    findRevision: async (...parameters) => (await opening).findRevision(...parameters),
    putClass: async (...parameters) => (await opening).putClass(...parameters),
    deleteClass: async (...parameters) => (await opening).deleteClass(...parameters),
    findKey: async (...parameters) => (await opening).findKey(...parameters),
    addKey: async (...parameters) => (await opening).addKey(...parameters),
    keys: async () => (await opening).keys(),
    revokeKey: async (...parameters) => (await opening).revokeKey(...parameters),
    close: async () => {
      const store = await opening.catch(() => undefined)
      await store?.close()
    },
  }
}
