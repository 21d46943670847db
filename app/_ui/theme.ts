/** The person's choice of theme; `system` follows the device. Kept in a cookie so that the first paint is right. */
export const themes = ['system', 'light', 'dark'] as const
export type Theme = (typeof themes)[number]

export const themeCookie = 'panewright-theme'

export function themeOf(text: string | undefined): Theme {
  return themes.find((theme) => theme === text) ?? 'system'
}

const listeners = new Set<() => void>()

export function currentTheme(): Theme {
  return themeOf(document.documentElement.dataset.theme)
}

export function setTheme(theme: Theme): void {
  if (theme === 'system') delete document.documentElement.dataset.theme
  else document.documentElement.dataset.theme = theme
  const year = 60 * 60 * 24 * 365
  // The Cookie Store interface is missing from Firefox and Safari, and the cookie holds no secret.
  // biome-ignore lint/suspicious/noDocumentCookie: see above
  document.cookie = `${themeCookie}=${theme}; Path=/; Max-Age=${year}; SameSite=Lax`
  for (const listener of listeners) listener()
}

/** light to dark and back, from whichever is on the screen now. */
export function switchTheme(): void {
  setTheme(isDark() ? 'light' : 'dark')
}

export function isDark(): boolean {
  const theme = currentTheme()
  return theme === 'system' ? matchMedia('(prefers-color-scheme: dark)').matches : theme === 'dark'
}

/** Called whenever the colours on the screen change: by the person here, or by the device. For pieces that paint on canvas. */
export function onThemeChange(listener: () => void): () => void {
  const device = matchMedia('(prefers-color-scheme: dark)')
  listeners.add(listener)
  device.addEventListener('change', listener)
  return () => {
    listeners.delete(listener)
    device.removeEventListener('change', listener)
  }
}
