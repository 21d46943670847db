const bars = [16, 32, 48, 64, 80, 96, 112, 128, 144, 160, 176]

/** A growing house drawn to scale, as a drawing office would: decoration, hidden from screen readers. */
export function Elevation() {
  return (
    <svg viewBox="0 0 224 132" className="w-full" fill="none" stroke="currentColor" aria-hidden="true">
      <path d="M14 46 34 18h172l4 6" strokeWidth="1" />
      <path d="M14 46h192V18H34z" fill="var(--frost)" strokeWidth="1.4" strokeLinejoin="round" />
      <path d="M14 46h192v52H14z" fill="var(--raised)" strokeWidth="1.4" strokeLinejoin="round" />
      <path d="M14 82h192v16H14z" fill="var(--straw)" strokeWidth="1" />
      <g strokeWidth="0.7">
        {bars.map((x) => (
          <path key={x} d={`M${14 + x} 46v36M${14 + x} 46 ${34 + x * (172 / 192)} 18`} />
        ))}
      </g>
      <g className="text-clay" stroke="currentColor" strokeWidth="1.2">
        <path d="M62 22h32l-2.8 10H57z" fill="var(--raised)" />
        <path d="M126 22h32l2 10h-34z" fill="var(--raised)" />
      </g>
      <g className="text-quiet" stroke="currentColor" strokeWidth="0.7">
        <path d="M14 112h192M14 107v10M206 107v10" />
        <path d="M218 18v80M214 18h8M214 98h8" strokeDasharray="2 2" />
      </g>
    </svg>
  )
}
