import { type Result, succeed } from '../../failures'
import type { SolveIntegerProgram } from '../cutting/exact'
import { solveCutting } from '../cutting/solve'
import type { ProfileStock } from './covering'
import type { LayoutRules } from './rules'

export interface ProfileNeed {
  readonly profile: ProfileStock
  readonly mark: string
  readonly length: number
  /** Whether it may be made of several lengths end to end. */
  readonly spliceable: boolean
}

export interface BoughtProfile {
  readonly kind: string
  readonly code: string
  readonly length: number
  readonly price: number
  readonly cuts: readonly { readonly mark: string; readonly length: number }[]
  readonly offcut: number
}

export interface Plan {
  readonly what: string
  readonly cost: number
  readonly bound: number
  readonly proven: boolean
}

export interface ProfilePurchase {
  readonly bought: readonly BoughtProfile[]
  readonly plans: readonly Plan[]
  readonly notes: readonly string[]
}

/**
 * C13 Profiles are cut from bars of one length a code. A joint profile is one piece within a slope, as long as a bar is
 * long enough; end, edge, ridge, corner and base profiles longer than a bar are made of whole bars and the rest.
 */
export function buyProfiles(
  needs: readonly ProfileNeed[],
  rules: LayoutRules,
  integerProgram?: SolveIntegerProgram,
): Result<ProfilePurchase> {
  const groups = new Map<string, ProfileNeed[]>()
  for (const need of needs) {
    if (!(need.length > rules.smallestOffcut / 10)) continue
    const key = `${need.profile.kind} ${need.profile.code}`
    const group = groups.get(key)
    if (group) group.push(need)
    else groups.set(key, [need])
  }
  const bought: BoughtProfile[] = []
  const plans: Plan[] = []
  const notes: string[] = []
  for (const group of groups.values()) {
    const profile = group[0]?.profile
    if (!profile) continue
    const { kind, code, price } = profile
    const what = `${kind} profiles ${code}`
    if (!(profile.length > 0)) {
      const cuts = group.map(({ mark, length }) => ({ mark, length: round(length) }))
      for (const cut of cuts)
        bought.push({ kind, code, length: cut.length, price: price * cut.length, cuts: [cut], offcut: 0 })
      const cost = cuts.reduce((sum, cut) => sum + price * cut.length, 0)
      plans.push({ what, cost, bound: cost, proven: true })
      continue
    }
    if (group.some((need) => !need.spliceable && need.length > profile.length * (1 + 1e-9)))
      notes.push(
        `${code}: joints longer than its bars of ${round(profile.length)} are made of two lengths over a purlin.`,
      )
    const pieces = group.flatMap((need) => inBars(need, profile.length, rules.narrowestStrip))
    const cost = round(price * profile.length)
    const plan = solveCutting(
      { kerf: rules.profileKerf, stock: [{ length: profile.length, price: cost }], pieces },
      integerProgram,
    )
    if (!plan.ok) return plan
    for (const bar of plan.value.bars)
      bought.push({
        kind,
        code,
        length: bar.stock,
        price: cost,
        cuts: bar.pieces.map((length, i) => ({ mark: bar.marks?.[i] ?? '', length })),
        offcut: bar.offcut,
      })
    const { bound, proven } = plan.value
    plans.push({ what, cost: plan.value.cost, bound, proven })
  }
  return succeed({ bought, plans, notes })
}

/** Whole bars and the rest; where the rest would be too short to fix, the last two share evenly. */
function inBars({ mark, length, spliceable }: ProfileNeed, bar: number, shortest: number) {
  const one = (size: number) => ({ mark, length: Math.min(bar, round(size)), count: 1 })
  if (length <= bar * (1 + 1e-9)) return [one(length)]
  const whole = Math.floor(length / bar + 1e-9)
  const rest = length - whole * bar
  if (!spliceable) {
    const parts = Math.ceil(length / bar - 1e-9)
    return Array.from({ length: parts }, () => one(length / parts))
  }
  if (rest <= 1e-9 * bar) return Array.from({ length: whole }, () => one(bar))
  const bars = Array.from({ length: rest < shortest ? whole - 1 : whole }, () => one(bar))
  return rest < shortest ? [...bars, one((bar + rest) / 2), one((bar + rest) / 2)] : [...bars, one(rest)]
}

function round(size: number): number {
  return Math.round(size * 1e9) / 1e9
}
