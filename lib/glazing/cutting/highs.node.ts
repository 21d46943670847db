import loadHighs from 'highs'
import type { SolveIntegerProgram } from './exact'

/** HiGHS (wasm). Work is limited by branch nodes, so that the answer does not depend on the machine's speed. */
export async function loadIntegerProgram(nodeLimit = 300): Promise<SolveIntegerProgram> {
  const highs = await loadHighs()
  return (model) => {
    const solution = highs.solve(model, {
      mip_rel_gap: 1e-9,
      mip_max_nodes: nodeLimit,
      time_limit: 20,
      output_flag: false,
    })
    const values: Record<string, number> = {}
    for (const [name, column] of Object.entries(solution.Columns)) {
      if ('Primal' in column && typeof column.Primal === 'number') values[name] = column.Primal
    }
    const proven = solution.Status === 'Optimal'
    if (!proven && Object.keys(values).length === 0) return undefined
    // Stopped before the end: the best plan so far, of which nothing is proven.
    const bound = proven ? solution.ObjectiveValue : Number.NEGATIVE_INFINITY
    return { objective: solution.ObjectiveValue, values, bound }
  }
}
