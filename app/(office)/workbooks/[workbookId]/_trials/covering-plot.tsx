'use client'

import { CartesianGrid, ResponsiveContainer, Scatter, ScatterChart, XAxis, YAxis, ZAxis } from 'recharts'

export interface Point {
  readonly code: string
  /** Its number in the table beside the plot. */
  readonly number: number
  readonly price: number
  readonly heat: number
  readonly light: number
  readonly now: boolean
}

export interface CoveringPlotProps {
  readonly points: readonly Point[]
  readonly priceLabel: string
  readonly heatLabel: string
  readonly showPrice: (value: number) => string
  readonly showHeat: (value: number) => string
  readonly marked: string | undefined
  readonly onMark: (code: string) => void
}

const tick = { fill: 'var(--quiet)', fontSize: 12, fontFamily: 'var(--font-mono)' }
const margin = { top: 14, right: 40, bottom: 26, left: 8 }

/** Price against yearly heat; the larger the disc, the more light in winter. The table beside it says the same in figures. */
export default function CoveringPlot(props: CoveringPlotProps) {
  const { points, marked, onMark } = props
  return (
    <ResponsiveContainer width="100%" height="100%">
      <ScatterChart margin={margin} accessibilityLayer={false}>
        <CartesianGrid stroke="var(--line)" />
        <XAxis
          type="number"
          dataKey="price"
          domain={['auto', 'auto']}
          tick={tick}
          tickFormatter={props.showPrice}
          stroke="var(--edge)"
          tickCount={4}
          label={{
            value: props.priceLabel,
            position: 'insideBottom',
            offset: -16,
            fill: 'var(--quiet)',
            fontSize: 13,
          }}
        />
        <YAxis
          type="number"
          dataKey="heat"
          domain={['auto', 'auto']}
          tick={tick}
          tickFormatter={props.showHeat}
          stroke="var(--edge)"
          width={64}
        />
        <ZAxis type="number" dataKey="light" range={[110, 620]} />
        <Scatter
          data={[...points]}
          isAnimationActive={false}
          shape={(drawn: unknown) => <Disc drawn={drawn as Drawn} marked={marked} onMark={onMark} />}
        />
      </ScatterChart>
    </ResponsiveContainer>
  )
}

interface Drawn {
  readonly cx?: number
  readonly cy?: number
  readonly size?: number
  readonly payload?: Point
}

function Disc({
  drawn: { cx = 0, cy = 0, size = 200, payload },
  marked,
  onMark,
}: {
  readonly drawn: Drawn
  readonly marked: string | undefined
  readonly onMark: (code: string) => void
}) {
  if (!payload) return null
  const radius = Math.sqrt(size / Math.PI)
  const on = payload.code === marked
  return (
    <g onPointerEnter={() => onMark(payload.code)}>
      <circle
        cx={cx}
        cy={cy}
        r={radius}
        fill={on ? 'var(--clay)' : 'var(--frost)'}
        fillOpacity={on ? 1 : 0.85}
        stroke={on || payload.now ? 'var(--clay)' : 'var(--edge)'}
        strokeWidth={payload.now ? 3 : 1}
      />
      <text
        x={cx}
        y={cy}
        dy="0.35em"
        textAnchor="middle"
        fontSize={11}
        fontFamily="var(--font-mono)"
        fill={on ? 'var(--on-clay)' : 'var(--ink)'}
      >
        {payload.number}
      </text>
    </g>
  )
}
