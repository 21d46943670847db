import { readdirSync, readFileSync } from 'node:fs'
import { join, relative, sep } from 'node:path'

/** Everything that a stranger can call over HTTP, read from the tree, so that a new one cannot be forgotten. */

const methods = ['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS']

export interface RouteFile {
  /** From the folder that was listed, with forward slashes. */
  readonly file: string
  /** `/api/workbooks/[id]`. */
  readonly path: string
}

export function routeFiles(root: string): readonly RouteFile[] {
  return sourceFiles(root)
    .filter((file) => /(^|\/)route\.(ts|tsx|js|mjs)$/.test(file))
    .map((file) => ({ file, path: `/${file.split('/').slice(0, -1).filter(isSegment).join('/')}` }))
}

/** `POST /api/workbooks` for each handler that the module exports; other exports are settings. */
export function handlersOf(path: string, exported: readonly string[]): readonly string[] {
  return methods.filter((method) => exported.includes(method)).map((method) => `${method} ${path}`)
}

/** `file#function` for each server action: exports of a `'use server'` file, and any such directive deeper inside one. */
export function serverActions(root: string): readonly string[] {
  return sourceFiles(root).flatMap((file) => {
    const text = readFileSync(join(root, file), 'utf8')
    if (!/^\s*(['"])use server\1/m.test(text)) return []
    const atTop = /^(?:\s|\/\/[^\n]*\n|\/\*[\s\S]*?\*\/)*(['"])use server\1/.test(text)
    if (!atTop) return [`${file}#(inside)`]
    const names = [
      ...text.matchAll(
        /^export\s+(?:default\s+)?(?:async\s+)?(?:function\s*\*?|const|let|var|class)\s+([\w$]+)/gm,
      ),
    ].map((match) => match[1] ?? '')
    const listed = [...text.matchAll(/^export\s*\{([^}]*)\}/gm)].flatMap((match) =>
      (match[1] ?? '').split(',').map(
        (name) =>
          name
            .trim()
            .split(/\s+as\s+/)
            .at(-1) ?? '',
      ),
    )
    return [...names, ...listed].filter(Boolean).map((name) => `${file}#${name}`)
  })
}

function sourceFiles(root: string): readonly string[] {
  return readdirSync(root, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.(ts|tsx|js|jsx|mjs)$/.test(entry.name))
    .map((entry) => relative(root, join(entry.parentPath, entry.name)).split(sep).join('/'))
    .sort()
}

/** Groups in round brackets do not show in an address. */
function isSegment(folder: string): boolean {
  return !/^\(.*\)$/.test(folder)
}
