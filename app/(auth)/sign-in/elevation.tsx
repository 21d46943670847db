/** Feet: a small gable growing house. */
const house = { length: 48, width: 24, eave: 8, ridge: 14, sheet: 4, kneeWall: 2.5 }

type Point = readonly [along: number, across: number, up: number]

/** Parallel projection from the front right corner, a little from above; so parallel edges stay parallel. */
function at([along, across, up]: Point): string {
  const x = 12 + along * 2.6 + across * 1.7
  const y = 84 + along * 0.95 - across * 0.95 - up * 3.1
  return `${x.toFixed(1)} ${y.toFixed(1)}`
}

function face(...points: readonly Point[]): string {
  return `M${points.map(at).join('L')}z`
}

function line(from: Point, to: Point): string {
  return `M${at(from)}L${at(to)}`
}

const { length, width, eave, ridge, sheet, kneeWall } = house
const half = width / 2
const joints = Array.from({ length: length / sheet - 1 }, (_, n) => (n + 1) * sheet)
const roofPoint = (along: number, share: number): Point => [
  along,
  half * share,
  eave + (ridge - eave) * share,
]

const roof = face([0, 0, eave], [length, 0, eave], [length, half, ridge], [0, half, ridge])
const side = face([0, 0, 0], [length, 0, 0], [length, 0, eave], [0, 0, eave])
const knee = face([0, 0, 0], [length, 0, 0], [length, 0, kneeWall], [0, 0, kneeWall])
const end = face(
  [length, 0, 0],
  [length, width, 0],
  [length, width, eave],
  [length, half, ridge],
  [length, 0, eave],
)
const door = face([length, 10, 0], [length, 14, 0], [length, 14, 7], [length, 10, 7])
const vents = [8, 32].map((from) =>
  face(roofPoint(from, 0.6), roofPoint(from + 8, 0.6), roofPoint(from + 8, 0.95), roofPoint(from, 0.95)),
)
const glazing = [
  ...joints.map((along) => line([along, 0, kneeWall], [along, 0, eave])),
  ...joints.map((along) => line([along, 0, eave], [along, half, ridge])),
  ...[4, 8, 16, 20].map((across) =>
    line([length, across, 0], [length, across, eave + (1 - Math.abs(across - half) / half) * (ridge - eave)]),
  ),
].join('')
const measure = [
  line([0, -4, 0], [length, -4, 0]),
  line([0, -5, 0], [0, -3, 0]),
  line([length, -5, 0], [length, -3, 0]),
  line([length + 4, 0, 0], [length + 4, width, 0]),
  line([length + 3, 0, 0], [length + 5, 0, 0]),
  line([length + 3, width, 0], [length + 5, width, 0]),
].join('')

/** A growing house drawn to scale, as a drawing office would: decoration, hidden from screen readers. */
export function Elevation() {
  return (
    <svg
      viewBox="0 0 198 142"
      className="mx-auto w-full max-w-2xl"
      fill="none"
      stroke="currentColor"
      strokeLinejoin="round"
      strokeLinecap="round"
      aria-hidden="true"
    >
      <path d={end} fill="var(--paper)" strokeWidth="0.7" />
      <path d={side} fill="var(--paper)" strokeWidth="0.7" />
      <path d={knee} fill="var(--straw)" strokeWidth="0.5" />
      <path d={roof} fill="var(--frost)" strokeWidth="0.7" />
      <path d={glazing} strokeWidth="0.25" />
      <path d={door} fill="var(--straw)" strokeWidth="0.5" />
      {vents.map((vent) => (
        <path key={vent} d={vent} fill="var(--raised)" stroke="var(--clay)" strokeWidth="0.6" />
      ))}
      <path d={measure} stroke="var(--quiet)" strokeWidth="0.35" />
    </svg>
  )
}
