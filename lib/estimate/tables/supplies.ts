import { type GridRow, grid, type SheetDeclaration, tableLock } from '../declare'

const demo = 'invented (demo)'
const profile = (code: string, kind: string, description: string, price: number, length = 12): GridRow => ({
  code,
  kind,
  description,
  'stock length': length,
  price: Math.round(price * 100) / 100,
  source: demo,
})

export const profiles: SheetDeclaration = {
  id: 'profiles',
  name: 'Profiles',
  kind: 'table',
  about: 'Joints, ends, edges and channels, by length.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text' },
        {
          title: 'kind',
          quantity: 'text',
          absent: 'joint',
          choices: ['none', 'joint', 'end', 'edge', 'ridge', 'corner', 'base'],
        },
        { title: 'description', quantity: 'text', width: 300, absent: 'added for this job' },
        { title: 'stock length', quantity: 'length', absent: 0, limits: { min: 0, max: 1000, in: 'si' } },
        { title: 'price', quantity: 'money-per-length', absent: 0, limits: { min: 0, max: 1e6 } },
        { title: 'source', quantity: 'text', width: 200, absent: 'typed for this job' },
      ],
      rows: [
        profile('NONE', 'none', 'No profile', 0, 0),
        ...[4, 6, 8, 10].map((mm) =>
          profile(`H-${mm}`, 'joint', `Joint profile for ${mm} mm sheet`, 1.1 + mm * 0.06),
        ),
        profile('H-16', 'joint', 'Joint profile for 16 mm sheet', 2.6, 24),
        profile('H-25', 'joint', 'Joint profile for 25 mm sheet', 3.9, 24),
        profile('BAR', 'joint', 'Glazing bar with gasket', 4.2, 16),
        ...[4, 6, 8, 10, 16, 25].map((mm) =>
          profile(`U-${mm}`, 'end', `End profile for ${mm} mm sheet, tape included`, 0.9 + mm * 0.05, 8),
        ),
        profile('LOCK', 'end', 'Locking channel with wire, for film', 1.25, 8),
        profile('EDGE', 'edge', 'Edge profile', 1.4, 12),
        profile('RIDGE', 'ridge', 'Ridge cap', 3.8, 12),
        profile('CORNER', 'corner', 'Corner profile', 2.9, 12),
        profile('BASE', 'base', 'Base drip profile', 1.7, 12),
      ],
      table: { name: 'profiles', label: 'Profiles' },
    }),
  ],
}

export const fixings: SheetDeclaration = {
  id: 'fixings',
  name: 'Fixings',
  kind: 'table',
  about: 'Screws, washers and clips, each.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text' },
        { title: 'description', quantity: 'text', width: 320, absent: 'added for this job' },
        { title: 'price', quantity: 'money', absent: 0, limits: { min: 0, max: 1e6 } },
        { title: 'source', quantity: 'text', width: 200, absent: 'typed for this job' },
      ],
      rows: [
        { code: 'NONE', description: 'No fixing', price: 0, source: 'none needed' },
        { code: 'SCREW', description: 'Screw with wide washer and gasket', price: 0.62, source: demo },
        { code: 'SEAL-SCREW', description: 'Sealing screw through the crown', price: 0.34, source: demo },
        { code: 'CLIP', description: 'Clip for a bar', price: 0.48, source: demo },
      ],
      table: { name: 'fixings', label: 'Fixings' },
    }),
  ],
}

export const labour: SheetDeclaration = {
  id: 'labour',
  name: 'Labour',
  kind: 'table',
  about: 'What one person does in an hour, and what the hour costs.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text' },
        { title: 'task', quantity: 'text', width: 260, absent: 'added for this job' },
        { title: 'output an hour', quantity: 'number', absent: 1, limits: { above: 0, max: 1e6 } },
        { title: 'rate', quantity: 'money-per-hour', absent: 0, limits: { min: 0, max: 1e6 } },
        { title: 'source', quantity: 'text', width: 200, absent: 'typed for this job' },
      ],
      rows: [
        {
          code: 'SITE',
          task: 'Set out and clear up, a job',
          'output an hour': { value: 0.125, quantity: 'count' },
          rate: 46,
          source: demo,
        },
        {
          code: 'COVER',
          task: 'Fix covering, area',
          'output an hour': { value: 45, quantity: 'area' },
          rate: 46,
          source: demo,
        },
        {
          code: 'PROFILE',
          task: 'Fix profiles, length',
          'output an hour': { value: 30, quantity: 'length' },
          rate: 46,
          source: demo,
        },
        {
          code: 'OPENING',
          task: 'Frame and seal an opening',
          'output an hour': { value: 0.4, quantity: 'count' },
          rate: 52,
          source: demo,
        },
      ],
      table: { name: 'labour', label: 'Labour' },
    }),
  ],
}
