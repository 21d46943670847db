/**
 * Rounding of the decimal value that 15 significant digits show, half away from zero, as OpenFormula evaluators do;
 * binary rounding gives ROUND(1.005;2) = 1 and ROUNDUP(0.1*3*10;0) = 4.
 */
export type RoundingMode = 'half' | 'up' | 'down'

/** Rounds to `places` digits after the point (negative: before it). `up` is away from zero, `down` towards it. */
export function roundDecimal(value: number, places: number, mode: RoundingMode): number {
  if (!Number.isFinite(value) || value === 0) return value === 0 ? 0 : value
  const digits = Math.trunc(places)
  if (digits > 300) return value
  if (digits < -308) return 0
  const magnitude = Math.abs(value)
  const rounded = quick(magnitude, digits, mode) ?? exact(magnitude, digits, mode)
  return rounded === 0 ? 0 : value < 0 ? -rounded : rounded
}

/** The binary way, where the value is so far from a border that its last digits cannot matter; else undefined. */
function quick(magnitude: number, digits: number, mode: RoundingMode): number | undefined {
  if (digits < -22 || digits > 22) return undefined
  const power = 10 ** Math.abs(digits)
  const scaled = digits >= 0 ? magnitude * power : magnitude / power
  if (scaled > 1e13) return undefined
  const whole = Math.floor(scaled)
  const part = scaled - whole
  const doubt = scaled * 2e-14 + 1e-300
  const border = mode === 'half' ? Math.abs(part - 0.5) : Math.min(part, 1 - part)
  if (border <= doubt) return undefined
  const up = mode === 'up' || (mode === 'half' && part > 0.5)
  const result = up ? whole + 1 : whole
  return digits >= 0 ? result / power : result * power
}

/** The digits themselves: 15 of them as a whole number, cut at the place asked for. */
function exact(magnitude: number, digits: number, mode: RoundingMode): number {
  const [mantissa = '0', exponent = '0'] = magnitude.toExponential(14).split('e')
  const shift = Number(exponent) - 14 + digits
  if (shift >= 0) return magnitude
  const whole = BigInt(mantissa.replace('.', ''))
  // Everything beyond 15 digits is below one unit of the place.
  if (shift < -16) return mode === 'up' ? Number(`1e${-digits}`) : 0
  const unit = 10n ** BigInt(-shift)
  const rest = whole % unit
  const up = mode === 'up' ? rest > 0n : mode === 'half' && rest * 2n >= unit
  return Number(`${whole / unit + (up ? 1n : 0n)}e${-digits}`)
}

/** The greatest whole number that is not above the 15-digit value. */
export function floorDecimal(value: number): number {
  return roundDecimal(value, 0, value < 0 ? 'up' : 'down')
}

export function ceilingDecimal(value: number): number {
  return roundDecimal(value, 0, value < 0 ? 'down' : 'up')
}

/** A product or difference brought to 15 significant digits, so that 3 × 0.1 is 0.3. */
export function tidy(value: number): number {
  return value === 0 ? 0 : Number(value.toPrecision(15))
}
