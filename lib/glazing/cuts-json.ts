import type { Layout } from './layout/layout'

/** A layout as other programs read it: lengths in `length_unit`, names and shape as documented for `--cuts`. */
export function toCutsJson(layout: Layout) {
  return {
    length_unit: layout.lengthUnit,
    surfaces: layout.surfaces.map(({ name, covering, polygon, openings }) => ({
      name,
      covering,
      polygon,
      openings: openings.map(({ u, v, width, height }) => [u, v, width, height] as const),
    })),
    pieces: layout.pieces.map(({ mark, surface, covering, polygon, width, left, right, stock }) => ({
      mark,
      surface,
      covering,
      polygon,
      width,
      left_length: left,
      right_length: right,
      stock,
    })),
    stock: layout.stock.map(({ covering, width, length, price, pieces, offcuts }) => ({
      covering,
      width,
      length,
      price,
      pieces,
      offcuts,
    })),
    profiles: layout.profiles.map(({ kind, length, price, cuts, offcut }) => ({
      kind,
      length,
      price,
      cuts,
      offcut,
    })),
    plans: layout.plans.map(({ what, cost, bound, proven }) => ({ what, cost, bound, proven })),
  }
}

export type CutsJson = ReturnType<typeof toCutsJson>
