import { z } from 'zod'
import { fail, type Result, succeed } from '../../failures'
import type { CuttingProblem } from './problem'

const size = z.number().positive()

const sawListSchema = z.strictObject({
  kerf: z.number().min(0).default(0),
  stock: z
    .array(
      z.strictObject({
        length: size,
        price: z.number().min(0),
        available: z.int().min(0).optional(),
      }),
    )
    .min(1)
    .max(200),
  pieces: z
    .array(
      z.strictObject({
        length: size,
        count: z.int().min(0).max(100_000),
        mark: z.string().max(80).optional(),
      }),
    )
    .min(1)
    .max(5_000),
})

/** A saw list as it comes from a file. Errors: `invalid`, one line, with the place and what was expected. */
export function parseSawList(text: string): Result<CuttingProblem> {
  let json: unknown
  try {
    json = JSON.parse(text)
  } catch {
    return fail('invalid', 'Expected a JSON object with "kerf", "stock" and "pieces"; the file is not JSON.')
  }
  const parsed = sawListSchema.safeParse(json)
  if (!parsed.success) {
    const [first] = parsed.error.issues
    const place = first && first.path.length > 0 ? first.path.join('.') : 'the saw list'
    return fail('invalid', `${place}: ${(first?.message ?? 'not what was expected').replace(/\s+/g, ' ')}.`)
  }
  const { kerf, stock, pieces } = parsed.data
  return succeed({
    kerf,
    stock: stock.map(({ length, price, available }) =>
      available === undefined ? { length, price } : { length, price, available },
    ),
    pieces: pieces.map(({ length, count, mark }) =>
      mark === undefined ? { length, count } : { length, count, mark },
    ),
  })
}
