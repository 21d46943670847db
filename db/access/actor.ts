import type { MemberRole } from '../schema'

/** Who asks. Made by `actorOf` alone, from a live session; every access function begins with it. */
export interface Actor {
  readonly memberId: string
  readonly firmId: string
  readonly firmName: string
  readonly name: string
  readonly email: string
  readonly role: MemberRole
  readonly sessionId: string
}

export type Role = MemberRole

/** What a role may do to workbooks; locked sheets are the manager's. */
export function rightsOf(role: Role): { readonly change: boolean; readonly changeLocked: boolean } {
  return { change: role !== 'viewer', changeLocked: keepsPeople(role) }
}

/** Owners and managers. */
export function keepsPeople(role: Role): boolean {
  return role === 'owner' || role === 'manager'
}
