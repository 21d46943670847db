import type { Theme } from '@glideapps/glide-data-grid'

/** The roles of the style sheet as a canvas needs them: resolved colours. */
export interface Colours {
  readonly paper: string
  readonly raised: string
  readonly ink: string
  readonly quiet: string
  readonly line: string
  readonly clay: string
  readonly frost: string
  readonly straw: string
  readonly override: string
  readonly moss: string
  readonly ember: string
}

const roles = [
  'paper',
  'raised',
  'ink',
  'quiet',
  'line',
  'clay',
  'frost',
  'straw',
  'override',
  'moss',
  'ember',
] as const satisfies readonly (keyof Colours)[]

export function readColours(): Colours {
  const style = getComputedStyle(document.documentElement)
  const entries = roles.map((role) => [role, style.getPropertyValue(`--${role}`).trim()] as const)
  return Object.fromEntries(entries) as unknown as Colours
}

export const sans = '"Spline Sans Variable", ui-sans-serif, system-ui, sans-serif'
export const mono = '"Spline Sans Mono Variable", ui-monospace, monospace'

/** A canvas draws with whatever font is there at that moment, so the first draw waits for ours. */
export async function fontsReady(): Promise<void> {
  if (!document.fonts) return
  await Promise.all(
    [`400 13px ${sans}`, `600 13px ${sans}`, `400 13px ${mono}`].map((font) => document.fonts.load(font)),
  ).catch(() => undefined)
}

export function gridTheme(colours: Colours): Partial<Theme> {
  return {
    accentColor: colours.clay,
    accentFg: colours.raised,
    accentLight: mix(colours.clay, 0.1),
    textDark: colours.ink,
    textMedium: colours.quiet,
    textLight: colours.quiet,
    textHeader: colours.ink,
    textHeaderSelected: colours.ink,
    bgCell: colours.raised,
    bgCellMedium: colours.paper,
    bgHeader: colours.paper,
    bgHeaderHasFocus: colours.paper,
    bgHeaderHovered: colours.paper,
    borderColor: colours.line,
    horizontalBorderColor: colours.line,
    headerBottomBorderColor: colours.line,
    cellHorizontalPadding: 9,
    cellVerticalPadding: 3,
    headerFontStyle: '600 13px',
    baseFontStyle: '13px',
    markerFontStyle: '12px',
    editorFontSize: '13px',
    fontFamily: sans,
    lineHeight: 1.4,
    roundingRadius: 0,
  }
}

/** The colour let through by `alpha`; colours of the style sheet are six hexadecimal digits. */
export function mix(colour: string, alpha: number): string {
  const [, r = '0', g = '0', b = '0'] = /^#(..)(..)(..)$/.exec(colour) ?? []
  return `rgba(${Number.parseInt(r, 16)}, ${Number.parseInt(g, 16)}, ${Number.parseInt(b, 16)}, ${alpha})`
}
