import { always, hasWorkbook } from './availability'
import type { Command } from './command'

export const viewCommands: readonly Command[] = [
  {
    id: 'open-palette',
    title: 'Find a command',
    synonyms: ['palette', 'search', 'everything else'],
    group: 'View',
    keys: ['Mod+K'],
    keysWork: 'everywhere',
    anywhere: true,
    when: always,
    run: () => ({ kind: 'view', change: { kind: 'open-palette' } }),
  },
  {
    id: 'list-checks',
    title: 'Things to look at',
    synonyms: ['checks', 'warnings', 'errors', 'problems', 'missing', 'overrides', 'what is wrong'],
    group: 'View',
    keys: ['Alt+Shift+L'],
    keysWork: 'everywhere',
    when: hasWorkbook,
    says: () => 'Lists warnings, missing inputs, errors and overrides; Enter goes to the cell.',
    run: () => ({ kind: 'view', change: { kind: 'list-checks' } }),
  },
  {
    id: 'switch-theme',
    title: 'Switch between light and dark',
    synonyms: ['theme', 'dark mode', 'light mode', 'night', 'colours', 'appearance'],
    group: 'View',
    anywhere: true,
    when: always,
    says: () => 'Changes how this screen looks, for you alone.',
    run: () => ({ kind: 'view', change: { kind: 'switch-theme' } }),
  },
]

export const accountCommands: readonly Command[] = [
  {
    id: 'sign-out',
    title: 'Sign out',
    synonyms: ['log out', 'logout', 'leave', 'end session'],
    group: 'Account',
    anywhere: true,
    when: always,
    says: () => 'Ends your sign-in at once.',
    run: () => ({ kind: 'view', change: { kind: 'sign-out' } }),
  },
]
