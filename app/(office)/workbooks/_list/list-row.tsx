import Link from 'next/link'
import type { ListedWorkbook } from './row'
import { type RowAction, RowMenu } from './row-menu'

/** Columns of the list from the width where they fit; below it a row is a small card. */
export const columnsClass =
  'lg:grid lg:grid-cols-[minmax(0,1fr)_7.5rem_9.5rem_9rem_7rem_2.5rem] lg:items-center lg:gap-x-5'

export function ListRow({
  workbook,
  mayChange,
  onChoose,
}: {
  readonly workbook: ListedWorkbook
  readonly mayChange: boolean
  readonly onChoose: (action: RowAction) => void
}) {
  return (
    <li
      className={`relative border-b border-line px-4 py-4 hover:bg-[color-mix(in_srgb,var(--frost)_45%,transparent)] sm:px-5 ${columnsClass}`}
    >
      <div className="min-w-0 pr-12 lg:pr-0">
        <Link
          href={`/workbooks/${workbook.id}`}
          data-row
          prefetch={false}
          className="line-clamp-2 font-semibold outline-none after:absolute after:inset-0 after:rounded-[3px] focus-visible:after:outline-2 focus-visible:after:-outline-offset-2 focus-visible:after:outline-clay"
        >
          {workbook.title}
        </Link>
        <p className="text-sm text-quiet">
          {workbook.state} · made by {workbook.madeBy}
        </p>
      </div>
      <dl className="mt-3 grid grid-cols-2 gap-x-6 gap-y-2 sm:grid-cols-3 lg:contents">
        {workbook.figures.map((figure) => (
          <div key={figure.label} className="lg:text-right">
            <dt className="text-sm text-quiet lg:sr-only">{figure.label}</dt>
            <dd>
              {figure.number === undefined ? (
                <span className="text-quiet">
                  <span aria-hidden="true">–</span>
                  <span className="sr-only">not computed yet</span>
                </span>
              ) : (
                <>
                  <span className="figure">{figure.number}</span>
                  {figure.unit ? <span className="text-sm text-quiet"> {figure.unit}</span> : null}
                </>
              )}
            </dd>
          </div>
        ))}
      </dl>
      <p className="mt-3 text-sm text-quiet lg:mt-0">
        <span className="lg:sr-only">Changed </span>
        <time dateTime={workbook.changedAt}>{workbook.changed}</time>
      </p>
      <div className="absolute top-3 right-2 z-10 lg:static">
        <RowMenu id={workbook.id} title={workbook.title} mayChange={mayChange} onChoose={onChoose} />
      </div>
    </li>
  )
}
