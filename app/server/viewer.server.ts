import type { Member } from '#app/server/session.server.ts'

/** What the frame of a page shows of the person who looks at it. */
export const viewerOf = ({ name, organisationName, role }: Member) => ({ name, organisationName, role })
