import type { PaletteState } from './use-palette'

/** Stands where the list would: a list box without options is none. */
export function Nothing({ palette }: { readonly palette: PaletteState }) {
  const { stage, text } = palette
  return <p className="border-line border-t px-4 py-4 text-quiet sm:px-5">{words()}</p>

  function words(): string {
    if (stage.kind === 'find') {
      return 'Nothing is called that. Try a sheet, a value such as “eave height 9 ft”, a cell such as B7, or a covering.'
    }
    if (text.trim() === '') return 'There is nothing to choose here yet.'
    return `No ${stage.spec.label.replace(/^an? /, '')} is called that.`
  }
}
