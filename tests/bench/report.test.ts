import { expect, test } from 'vitest'
import { type Line, verdict } from './report'

const line = (value: number, goal?: Line['goal'], unit: Line['unit'] = 'ratio'): Line => ({
  section: 'engine',
  what: 'a measurement',
  value,
  unit,
  ...(goal && { goal }),
  raw: '',
})

test.each([
  { said: line(1.15, { most: 1.15 }), expected: 'met' },
  { said: line(1.265, { most: 1.15 }), expected: 'falls short by 10 %' },
  { said: line(0.6, { least: 0.6 }), expected: 'met' },
  { said: line(0.3, { least: 0.6 }), expected: 'falls short by 50 %' },
  { said: line(172, { most: 0 }, 'bytes'), expected: 'falls short by 172 bytes' },
  { said: line(2), expected: '' },
])('a line of $said.value says "$expected"', ({ said, expected }) => {
  expect(verdict(said)).toBe(expected)
})
