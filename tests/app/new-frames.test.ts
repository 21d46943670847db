import { expect, test } from 'vitest'
import { newFrames } from '@/app/(office)/workbooks/_list/frame-outline'
import { buildWorkbook } from '@/lib/estimate'

test.each(
  newFrames.flatMap(
    ({ value }) =>
      [
        [value, 'us'],
        [value, 'si'],
      ] as const,
  ),
)('a %s in %s units can be begun with', (frame, system) => {
  const built = buildWorkbook({ system, inputs: { frame_type: frame } })
  expect(built.ok ? 'built' : built.failure.text).toBe('built')
})
