import { useCallback, useState } from 'react'

/** Whether the palette is open, and the command that it was opened with. */
export function usePalette() {
  const [state, setState] = useState<{ readonly open: boolean; readonly command: string | undefined }>({
    open: false,
    command: undefined,
  })
  const show = useCallback((command?: string) => setState({ open: true, command }), [])
  const close = useCallback(() => setState({ open: false, command: undefined }), [])
  return { ...state, show, close }
}
