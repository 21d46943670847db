/** What a new workbook can begin with; each stands with the template's own sizes. */
export const newFrames = [
  { value: 'gable', title: 'Gable', detail: 'Two slopes and a ridge' },
  { value: 'hoop', title: 'Hoop', detail: 'Bent bows, film or thin sheet' },
  { value: 'lean-to', title: 'Lean-to', detail: 'One slope against a wall' },
  { value: 'single-slope', title: 'Single slope', detail: 'One slope, standing free' },
] as const

type Frame = (typeof newFrames)[number]['value']

const outlines: Readonly<Record<Frame, string>> = {
  gable: 'M6 42V22L32 8l26 14v20z',
  hoop: 'M6 42C6 18 20 9 32 9s26 9 26 33z',
  'lean-to': 'M14 42V10l44 16v16z',
  'single-slope': 'M8 42V12l48 12v18z',
}

const glazing: Readonly<Record<Frame, string>> = {
  gable: 'M6 22h52M19 15v27M32 8v34M45 15v27',
  hoop: 'M9 28h46M19 14v28M32 9v33M45 14v28',
  'lean-to': 'M14 26h44M28 15v27M43 21v21M4 4v38M9 4v38',
  'single-slope': 'M8 24h48M24 16v26M40 20v22',
}

/** End elevation of a frame type; decoration beside its name. */
export function FrameOutline({ frame }: { readonly frame: Frame }) {
  return (
    <svg viewBox="0 0 64 46" className="w-14 shrink-0" fill="none" stroke="currentColor" aria-hidden="true">
      <path d={glazing[frame]} strokeWidth="0.8" className="text-quiet" stroke="currentColor" />
      <path d={outlines[frame]} strokeWidth="1.8" strokeLinejoin="round" />
    </svg>
  )
}
