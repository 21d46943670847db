const states: Readonly<Record<string, string>> = {
  draft: 'Draft',
  'in-review': 'In review',
  approved: 'Approved',
  quoted: 'Quoted',
  accepted: 'Accepted',
  declined: 'Declined',
  expired: 'Expired',
  ordered: 'Ordered',
}

export function stateWord(state: string): string {
  return states[state] ?? state
}

const roles: Readonly<Record<string, string>> = {
  owner: 'Owner',
  manager: 'Manager',
  estimator: 'Estimator',
  viewer: 'Viewer',
}

export function roleWord(role: string): string {
  return roles[role] ?? role
}

const steps = [
  { below: 60, seconds: 1, unit: 'second' },
  { below: 3_600, seconds: 60, unit: 'minute' },
  { below: 86_400, seconds: 3_600, unit: 'hour' },
  { below: 7 * 86_400, seconds: 86_400, unit: 'day' },
] as const

/** "just now", "3 minutes ago", "yesterday"; after a week the date. Both moments are given, so it is the same everywhere. */
export function changedWords(at: Date, now: Date): string {
  const age = Math.max(0, (now.getTime() - at.getTime()) / 1000)
  if (age < 45) return 'just now'
  const step = steps.find(({ below }) => age < below)
  if (!step) {
    return at.toLocaleDateString('en-GB', {
      day: 'numeric',
      month: 'short',
      year: 'numeric',
      timeZone: 'UTC',
    })
  }
  return new Intl.RelativeTimeFormat('en', { numeric: 'auto' }).format(
    -Math.max(1, Math.floor(age / step.seconds)),
    step.unit,
  )
}
