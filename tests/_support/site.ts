import { inject } from 'vitest'

export { demoFirm, otherFirm } from './sign-ins'

/** Address of the application under test, without a slash at the end. For tests of the `browser` project. */
export function siteAddress(): string {
  return inject('siteAddress')
}
