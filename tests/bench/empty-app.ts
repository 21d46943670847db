import { spawn } from 'node:child_process'
import { cpSync, mkdirSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'

export const projectRoot = fileURLToPath(new URL('../../', import.meta.url)).replace(/\/$/, '')

/** Everything the benchmarks write goes here; it is ignored by git and may be deleted. */
export const benchFolder = join(projectRoot, '.data', 'bench')

/**
 * The least that a Next application can be, built with this project's own packages: a page with one client
 * component, and a route that parses the body of an append and answers, without a database. Gives its folder.
 */
export async function buildEmptyApp(): Promise<string> {
  const folder = join(benchFolder, 'empty-app')
  rmSync(folder, { recursive: true, force: true })
  for (const [path, text] of Object.entries(files)) {
    mkdirSync(dirname(join(folder, path)), { recursive: true })
    writeFileSync(join(folder, path), text)
  }
  // Copied, so that nothing of the empty application resolves to a setting of this one.
  for (const part of ['failures.ts', 'units', 'workbook']) {
    cpSync(join(projectRoot, 'lib', part), join(folder, 'lib', part), { recursive: true })
  }
  await buildNext(folder)
  return folder
}

/** `next build` in a folder of this project; throws with its output when it fails. */
export function buildNext(folder: string, env: Record<string, string> = {}): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [nextBin, 'build', folder], {
      cwd: folder,
      env: { ...process.env, ...env, NEXT_TELEMETRY_DISABLED: '1', NODE_ENV: 'production' },
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

export const nextBin = join(projectRoot, 'node_modules', 'next', 'dist', 'bin', 'next')

const files: Record<string, string> = {
  'next.config.mjs': `export default { turbopack: { root: ${JSON.stringify(projectRoot)} }, poweredByHeader: false, typescript: { ignoreBuildErrors: true } }\n`,
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
