const entries = [
  { word: 'input', ground: 'bg-straw', mark: 'corner' },
  { word: 'computed', ground: 'bg-raised', mark: 'none' },
  { word: 'from a table', ground: 'bg-frost', mark: 'lines' },
  { word: 'override', ground: 'bg-override', mark: 'dot' },
] as const

/** What the grounds of the cells mean, with the mark that each carries beside its colour. */
export function Legend() {
  return (
    <ul
      className="m-0 flex list-none flex-wrap gap-x-4 gap-y-1 p-0 text-[0.8125rem] text-quiet"
      aria-label="Grounds of cells"
    >
      {entries.map(({ word, ground, mark }) => (
        <li key={word} className="flex items-center gap-1.5">
          <svg
            width="18"
            height="14"
            viewBox="0 0 18 14"
            aria-hidden="true"
            className={`border border-line ${ground}`}
          >
            {mark === 'corner' ? <path d="M3.5 6.5v-3h3" className="fill-none stroke-quiet" /> : null}
            {mark === 'lines' ? <path d="M3 3.5h5M3 5.5h5" className="fill-none stroke-quiet" /> : null}
            {mark === 'dot' ? <circle cx="13.5" cy="4.5" r="2.5" className="fill-clay" /> : null}
          </svg>
          {word}
        </li>
      ))}
    </ul>
  )
}
