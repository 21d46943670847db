import { useSyncExternalStore } from 'react'

const query = '(min-width: 48rem)'

/** Whether there is room to keep the first column in place while the others scroll. */
export function useWideScreen(): boolean {
  return useSyncExternalStore(
    (listener) => {
      const media = matchMedia(query)
      media.addEventListener('change', listener)
      return () => media.removeEventListener('change', listener)
    },
    () => matchMedia(query).matches,
    () => true,
  )
}
