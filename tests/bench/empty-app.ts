import { execFileSync, spawn } from 'node:child_process'
import { createHash } from 'node:crypto'
import { cpSync, existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'

export const projectRoot = fileURLToPath(new URL('../../', import.meta.url)).replace(/\/$/, '')

/** Everything the benchmarks write goes here; it is ignored by git and may be deleted. */
export const benchFolder = join(projectRoot, '.data', 'bench')

/** What the route's check of the body is made of, in lib. */
const copied = ['failures.ts', 'units', 'workbook']

/**
 * The least that a Next application can be, built with this project's own packages: a page with one client
 * component, and a route that parses the body of an append and answers, without a database. Gives its folder.
 */
export async function buildEmptyApp(): Promise<string> {
  const folder = join(benchFolder, 'empty-app')
  const stamp = join(folder, '.next', 'built-from')
  const inputs = hashOfInputs()
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === inputs) return folder
  rmSync(folder, { recursive: true, force: true })
  for (const [path, text] of Object.entries(files)) {
    mkdirSync(dirname(join(folder, path)), { recursive: true })
    writeFileSync(join(folder, path), text)
  }
  // Copied and linked, with the folder as the root of all that is looked for: the build would otherwise take the proxy
  // and the instrumentation of this project, which it finds in a folder above.
  for (const part of copied) {
    cpSync(join(projectRoot, 'lib', part), join(folder, 'lib', part), { recursive: true })
  }
  for (const name of withDependencies(['next', 'react', 'react-dom', 'zod'])) {
    mkdirSync(dirname(join(folder, 'node_modules', name)), { recursive: true })
    execFileSync('cp', ['-al', join(projectRoot, 'node_modules', name), join(folder, 'node_modules', name)])
  }
  await buildNext(folder)
  writeFileSync(stamp, inputs)
  return folder
}

function hashOfInputs(): string {
  const hash = createHash('sha256').update(JSON.stringify(files))
  hash.update(readFileSync(join(projectRoot, 'package-lock.json')))
  for (const part of copied) {
    const path = join(projectRoot, 'lib', part)
    const inside = part.includes('.') ? [''] : readdirSync(path, { recursive: true, encoding: 'utf8' }).sort()
    for (const name of inside) if (/\.ts$/.test(join(path, name))) hash.update(readFileSync(join(path, name)))
  }
  return hash.digest('hex')
}

/** The packages and all that they need, where they are installed. */
function withDependencies(names: readonly string[], found = new Set<string>()): Set<string> {
  for (const name of names) {
    const file = join(projectRoot, 'node_modules', name, 'package.json')
    if (found.has(name) || !existsSync(file)) continue
    found.add(name)
    const { dependencies, optionalDependencies } = JSON.parse(readFileSync(file, 'utf8')) as {
      readonly dependencies?: object
      readonly optionalDependencies?: object
    }
    withDependencies(Object.keys({ ...dependencies, ...optionalDependencies }), found)
  }
  return found
}

/** `next build` in a folder of this project; throws with its output when it fails. */
export function buildNext(folder: string): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [nextProgram(folder), 'build', folder], {
      cwd: folder,
      env: { ...process.env, NEXT_TELEMETRY_DISABLED: '1', NODE_ENV: 'production' },
    })
    let output = ''
    for (const stream of [child.stdout, child.stderr]) {
      stream.on('data', (data: Buffer) => {
        output += data.toString()
      })
    }
    child.on('error', reject)
    child.on('close', (code) => (code === 0 ? resolve() : reject(new Error(`next build failed:\n${output}`))))
  })
}

export function nextProgram(folder: string): string {
  return join(folder, 'node_modules/next/dist/bin/next')
}

const files: Record<string, string> = {
  'next.config.mjs': `export default { turbopack: { root: import.meta.dirname }, poweredByHeader: false, typescript: { ignoreBuildErrors: true } }\n`,
  'tsconfig.json': '{ "compilerOptions": { "jsx": "react-jsx" }, "include": ["**/*.ts"] }\n',
  'app/layout.jsx':
    'export const metadata = { title: \'Empty\' }\nexport default function Layout({ children }) {\n  return <html lang="en"><body>{children}</body></html>\n}\n',
  'app/page.jsx': "import { Count } from './count'\nexport default function Page() { return <Count /> }\n",
  'app/count.jsx':
    "'use client'\nimport { useState } from 'react'\nexport function Count() {\n  const [n, setN] = useState(0)\n  return <button type=\"button\" onClick={() => setN(n + 1)}>{n}</button>\n}\n",
  'app/operations/route.js': `import { appendRequestSchema } from '../../lib/workbook/wire'
export async function POST(request) {
  const parsed = appendRequestSchema.safeParse(await request.json())
  if (!parsed.success) return Response.json({ code: 'invalid' }, { status: 400 })
  const { base, operations } = parsed.data
  return Response.json({
    seq: base + operations.length,
    accepted: operations.map(({ id }, i) => ({ id, seq: base + i + 1 })),
  })
}
`,
}
