/** Stands where the grid will be while its code arrives. */
export function GridWaiting() {
  return (
    <div aria-hidden="true" className="h-full w-full bg-raised">
      <div className="h-11 border-line border-b bg-paper" />
      {Array.from({ length: 12 }, (_, i) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: rows of nothing, always the same
        <div key={i} className="h-7 border-line border-b" />
      ))}
    </div>
  )
}
