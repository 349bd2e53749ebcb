import type { Role } from '../store/registry.ts'

/** From the one that allows least to the one that allows most; each includes those before. */
export const ROLES = ['read', 'write', 'publish'] as const satisfies readonly Role[]
