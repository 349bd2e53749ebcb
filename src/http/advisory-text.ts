import { z } from 'zod'
import { jsonWriter } from './json-writer.ts'
import type { toAdvisoryReply } from './reply.ts'
import { AdvisoryReply } from './reply.schema.ts'

/** An advisory as it goes out, with the line of the stream that it answers. */
export const advisoryText: (reply: ReturnType<typeof toAdvisoryReply>) => string = jsonWriter(
  z.object({ line: z.int().optional(), ...AdvisoryReply.shape }),
)
