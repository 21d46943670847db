import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, test } from 'vitest'

const css = readFileSync(join(process.cwd(), 'app/globals.css'), 'utf8')
const light = roles(/^:root \{([^}]*)\}/m)
const darkByDevice = roles(/:root:not\(\[data-theme="light"\]\) \{([^}]*)\}/)
const darkByChoice = roles(/^:root\[data-theme="dark"\] \{([^}]*)\}/m)

/** WCAG 2.2, 1.4.3 (text 4.5:1) and 1.4.11 (edges of controls 3:1). */
const text = { ink: 4.5, quiet: 4.5 }
const grounds = ['paper', 'raised', 'frost', 'straw', 'override']
const pairs: [string, string, number][] = [
  ...grounds.flatMap((ground) =>
    Object.entries(text).map(([role, least]): [string, string, number] => [role, ground, least]),
  ),
  ...['clay', 'moss', 'ember'].flatMap((role): [string, string, number][] => [
    [role, 'paper', 4.5],
    [role, 'raised', 4.5],
  ]),
  ['on-clay', 'clay', 4.5],
  ['edge', 'paper', 3],
  ['edge', 'raised', 3],
  ['clay', 'straw', 3],
  ['clay', 'frost', 3],
  ['clay', 'override', 3],
]

describe.each([
  ['light', light],
  ['dark', darkByChoice],
])('%s theme', (_name, theme) => {
  test.each(pairs)('%s on %s has contrast of at least %d', (front, ground, least) => {
    expect(contrast(theme.get(front), theme.get(ground))).toBeGreaterThanOrEqual(least)
  })
})

test('the dark theme is the same by the device and by choice', () => {
  expect([...darkByDevice]).toEqual([...darkByChoice])
})

test('every role of the light theme has a dark one', () => {
  expect([...darkByChoice.keys()]).toEqual([...light.keys()])
})

function roles(block: RegExp): Map<string, string> {
  const body = block.exec(css)?.[1] ?? ''
  return new Map([...body.matchAll(/--([\w-]+): (#[0-9a-f]{6});/g)].map((m) => [m[1] ?? '', m[2] ?? '']))
}

function contrast(a: string | undefined, b: string | undefined): number {
  const [low = 0, high = 0] = [luminance(a), luminance(b)].sort((x, y) => x - y)
  return (high + 0.05) / (low + 0.05)
}

/** Relative luminance as WCAG 2.2 defines it. */
function luminance(hex: string | undefined): number {
  if (!hex) throw new Error('no such role')
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => {
    const c = Number.parseInt(hex.slice(at, at + 2), 16) / 255
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4
  })
  return 0.2126 * r + 0.7152 * g + 0.0722 * b
}
