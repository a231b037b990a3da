import { servesLoopbackOnly } from '#app/server/env.server.ts'

/**
 * Whether an address belongs to a demonstration account that is not served here. Their password is known to
 * everybody, so they work on one's own computer only. No real address ends in the reserved name .test (RFC 2606).
 */
export function isRefusedDemo(email: string): boolean {
  return !servesLoopbackOnly && email.trim().toLowerCase().endsWith('.test')
}
