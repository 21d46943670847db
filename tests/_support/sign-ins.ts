import demo from '../../db/seed/demo.json'

type Role = 'owner' | 'manager' | 'estimator' | 'viewer'

function emailOf(role: Role): string {
  const member = demo.members.find((one) => one.role === role)
  if (!member) throw new Error(`the demo has no ${role}`)
  return member.email
}

/** The demo firm's sign-ins by role. */
export const demoFirm = {
  id: demo.firm.id,
  password: demo.password,
  emails: {
    owner: emailOf('owner'),
    manager: emailOf('manager'),
    estimator: emailOf('estimator'),
    viewer: emailOf('viewer'),
  },
} as const

/** A second firm, in tests only. */
export const otherFirm = {
  id: '9d0c3b10-7f45-4c1b-8a55-0b6d1c2e3f01',
  password: 'elsewhere entirely',
  emails: {
    owner: 'owner@elsewhere.example',
    manager: 'manager@elsewhere.example',
    estimator: 'estimator@elsewhere.example',
    viewer: 'viewer@elsewhere.example',
  },
  workbook: { id: '9d0c3b10-7f45-4c1b-8a55-0b6d1c2e3f02', title: 'Elsewhere house' },
} as const
