import type { FastifyReply } from 'fastify'
import { VARY } from './negotiate.ts'

/** Pages bring everything with them and run nothing. */
const POLICY =
  "default-src 'none'; style-src 'unsafe-inline'; img-src data:; form-action 'self'; frame-ancestors 'self'"

/** Sends a page that a person reads in a browser. */
export const sendPage = (reply: FastifyReply, page: string): FastifyReply =>
  reply
    .header('content-security-policy', POLICY)
    .header('cache-control', 'private, no-cache')
    .header('vary', VARY)
    .type('text/html; charset=utf-8')
    .send(page)
