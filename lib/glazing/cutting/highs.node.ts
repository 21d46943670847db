import loadHighs from 'highs'
import type { SolveIntegerProgram } from './exact'

/** HiGHS (wasm). Work is limited by branch nodes, so that the answer does not depend on the machine's speed. */
export async function loadIntegerProgram(nodeLimit = 4_000): Promise<SolveIntegerProgram> {
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
    if (solution.Status !== 'Optimal') return undefined
    return { objective: solution.ObjectiveValue, values, bound: solution.ObjectiveValue }
  }
}
