/** Money is shown in one notation (`en`), so that a printed amount can be typed back. */
const formats = new Map<string, Intl.NumberFormat>()

/** Digits default to the currency's own (two for most, none for some). An unknown code is printed as it is. */
export function moneyFormat(currency: string, digits: number | undefined): Intl.NumberFormat {
  const key = `${currency} ${digits ?? ''}`
  let format = formats.get(key)
  if (!format) {
    const known = /^[A-Z]{3}$/.test(currency)
    format = new Intl.NumberFormat('en-US', {
      ...(known ? { style: 'currency', currency } : {}),
      ...(digits !== undefined
        ? { minimumFractionDigits: digits, maximumFractionDigits: digits }
        : known
          ? {}
          : { minimumFractionDigits: 2, maximumFractionDigits: 2 }),
      signDisplay: 'negative',
    })
    formats.set(key, format)
  }
  return format
}

/** `$`, `€`, `CA$`: as printed beside an amount; the code itself where it has no sign. */
export function currencySign(currency: string): string {
  return sign(currency, 'symbol')
}

function sign(currency: string, currencyDisplay: 'symbol' | 'narrowSymbol'): string {
  if (!/^[A-Z]{3}$/.test(currency)) return currency
  const parts = new Intl.NumberFormat('en-US', {
    style: 'currency',
    currency,
    currencyDisplay,
  }).formatToParts(0)
  return parts.find((part) => part.type === 'currency')?.value ?? currency
}

/** Digits after the point that the currency has by custom. */
export function currencyDigits(currency: string): number {
  return moneyFormat(currency, undefined).resolvedOptions().maximumFractionDigits ?? 2
}

const signLike = /^\p{Sc}|^[A-Z]{1,3}\p{Sc}|^[A-Z]{3}(?![\p{L}\p{N}])/u

export interface TypedCurrency {
  /** The currency mark as typed, absent when there was none. */
  readonly mark?: string
  readonly rest: string
}

/** Takes `$`, `CA$` or `USD` from the beginning. */
export function takeCurrency(text: string): TypedCurrency {
  const mark = signLike.exec(text)?.[0]
  return mark === undefined ? { rest: text } : { mark, rest: text.slice(mark.length).trimStart() }
}

/** Whether a typed mark means this currency: its code, its sign, or its short sign (`$` for Canadian dollars at home). */
export function isMarkOf(mark: string, currency: string): boolean {
  return mark === currency || mark === sign(currency, 'symbol') || mark === sign(currency, 'narrowSymbol')
}
