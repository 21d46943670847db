import { describe, expect, test } from 'vitest'
import { maximum, median, minimum, percentile } from './statistics'

describe('statistics of a benchmark', () => {
  test.each([
    { what: 'median of an odd count', got: median([9, 1, 5]), expected: 5 },
    { what: 'median of an even count lies between', got: median([4, 1, 3, 2]), expected: 2.5 },
    { what: 'minimum', got: minimum([3, 1, 2]), expected: 1 },
    { what: 'maximum', got: maximum([3, 1, 2]), expected: 3 },
    {
      what: 'p95 of 0 to 100',
      got: percentile(
        Array.from({ length: 101 }, (_, i) => 100 - i),
        95,
      ),
      expected: 95,
    },
    { what: 'p95 between two ranks', got: percentile([0, 10], 95), expected: 9.5 },
    { what: 'one number alone', got: percentile([7], 95), expected: 7 },
  ])('$what', ({ got, expected }) => {
    expect(got).toBeCloseTo(expected, 12)
  })

  test('the numbers asked about stay in their order', () => {
    const numbers = [3, 1, 2]
    median(numbers)
    expect(numbers).toEqual([3, 1, 2])
  })

  test('no numbers have no statistic', () => {
    expect(() => median([])).toThrow('no numbers')
  })
})
