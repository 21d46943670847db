const outlines: Readonly<Record<string, string>> = {
  gable: 'M6 42V22L32 8l26 14v20z',
  hoop: 'M6 42C6 18 20 9 32 9s26 9 26 33z',
}

const purlins: Readonly<Record<string, string>> = {
  gable: 'M6 22h52M19 15v27M32 8v34M45 15v27',
  hoop: 'M9 28h46M19 14v28M32 9v33M45 14v28',
}

/** End elevation of a frame type; decoration beside its name. */
export function FrameOutline({ frame }: { readonly frame: string }) {
  return (
    <svg viewBox="0 0 64 46" className="w-16" fill="none" stroke="currentColor" aria-hidden="true">
      <path d={purlins[frame]} strokeWidth="0.8" className="text-quiet" stroke="currentColor" />
      <path d={outlines[frame]} strokeWidth="1.8" strokeLinejoin="round" />
    </svg>
  )
}
