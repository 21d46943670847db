import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { handlersOf, routeFiles, serverActions } from '../_support/endpoints'

/** The lists that the access tests are held against must see whatever is planted. */
const root = mkdtempSync(join(tmpdir(), 'endpoints-test-'))
const planted: Record<string, string> = {
  'api/things/route.ts': 'export const GET = 1',
  '(office)/things/[id]/route.tsx': 'export async function PUT() {}',
  '(office)/things/actions.ts':
    "// why\n'use server'\n\nexport async function add() {}\nexport const drop = async () => {}\n",
  'x/more.ts':
    '/** a */\n"use server"\nasync function one() {}\nexport { one, one as two }\nexport default async function three() {}\n',
  'x/inside.tsx': "export function Page() {\n  async function act() {\n    'use server'\n  }\n}\n",
  'x/plain.ts': 'export const route = 1',
}

beforeAll(() => {
  for (const [file, text] of Object.entries(planted)) {
    mkdirSync(dirname(join(root, file)), { recursive: true })
    writeFileSync(join(root, file), text)
  }
})
afterAll(() => rmSync(root, { recursive: true }))

test('every route file is found, under its address', () => {
  expect(routeFiles(root)).toEqual([
    { file: '(office)/things/[id]/route.tsx', path: '/things/[id]' },
    { file: 'api/things/route.ts', path: '/api/things' },
  ])
})

test('every exported method is a handler, and nothing else is', () => {
  expect(handlersOf('/a', ['dynamic', 'DELETE', 'GET', 'default'])).toEqual(['GET /a', 'DELETE /a'])
})

test('every server action is found, however it is exported', () => {
  expect(serverActions(root)).toEqual([
    '(office)/things/actions.ts#add',
    '(office)/things/actions.ts#drop',
    'x/inside.tsx#(inside)',
    'x/more.ts#three',
    'x/more.ts#one',
    'x/more.ts#two',
  ])
})
