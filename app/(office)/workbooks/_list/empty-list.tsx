import Link from 'next/link'
import { Button, buttonClass } from '@/app/_ui/button'
import { FrameOutline } from './frame-outline'

/** Says what goes here and offers the one next step. */
export function EmptyList({
  search,
  onNew,
}: {
  readonly search: string
  readonly onNew: (() => void) | undefined
}) {
  return (
    <section className="mt-6 grid justify-items-start gap-4 rounded-soft border border-line bg-raised px-6 py-12 sm:px-12">
      {search === '' ? (
        <>
          <FrameOutline frame="gable" />
          <h2 className="text-lg font-semibold">A workbook is one house, from its dimensions to its price</h2>
          <p className="max-w-prose text-quiet">
            {onNew
              ? 'Give it a frame, and the sheets for surfaces, heat, take-off and price come with it.'
              : 'None has been made yet. When an estimator makes one, it stands here.'}
          </p>
          {onNew ? (
            <Button tone="action" onClick={onNew}>
              Make the first workbook
            </Button>
          ) : null}
        </>
      ) : (
        <>
          <h2 className="text-lg font-semibold">No workbook has “{search}” in its title</h2>
          <p className="text-quiet">Try fewer letters, or look through all of them.</p>
          <Link href="/workbooks" className={buttonClass()}>
            Show all workbooks
          </Link>
        </>
      )}
    </section>
  )
}
