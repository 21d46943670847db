import { steps } from './template'

/** Names of the template's inputs, results and constants, in the order of the sheets; tables and columns are left out. */
export const estimateNames: readonly string[] = steps().flatMap((sheet) =>
  sheet.blocks.flatMap((block) => {
    if (block.kind === 'lines') {
      return block.lines.flatMap((line) => (line.kind === 'heading' ? [] : [line.name]))
    }
    const columns = block.columns.flatMap(({ named }) =>
      named && named.role !== 'table' ? [named.name] : [],
    )
    const cells = block.rows.flatMap((row) =>
      Object.values(row).flatMap((content) =>
        typeof content === 'object' && 'name' in content && content.name ? [content.name.name] : [],
      ),
    )
    return [...columns, ...cells]
  }),
)
