/** The product's mark: a gable house in outline with one glazing bar. Decorative; the name stands beside it. */
export function Mark({ size = 20 }: { readonly size?: number }) {
  return (
    <svg
      width={size}
      height={size}
      viewBox="0 0 20 20"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.5"
      strokeLinejoin="round"
      strokeLinecap="round"
      aria-hidden="true"
      className="shrink-0"
    >
      <path d="M2 8.5 10 2l8 6.5V18H2z" className="text-clay" stroke="currentColor" />
      <path d="M2 8.5h16M10 2v16" strokeWidth="1.1" />
    </svg>
  )
}

export function Brand() {
  return (
    <span className="inline-flex items-center gap-2.5 font-semibold">
      <Mark />
      Panewright
    </span>
  )
}
