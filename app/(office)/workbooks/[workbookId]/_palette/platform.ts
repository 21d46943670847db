import { type Platform, platformOf } from '@/lib/commands'

/** The palette is never rendered on the server, so the device can be asked at once. */
export function usePlatform(): Platform {
  return platformOf(navigator.userAgent)
}
