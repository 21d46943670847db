'use client'

import dynamic from 'next/dynamic'
import { useMemo, useState } from 'react'
import { Button } from '@/app/_ui/button'
import { labelOf, type Trial, type TryEveryEffect } from '@/lib/commands'
import { formatQuantity, isMoney, unitOf } from '@/lib/units'
import { Panel } from '../_editor/panel'
import type { WorkbookSession } from '../_editor/session-contract'
import { currencyOf } from '../_tally/figures'
import { OutcomeTable } from './outcome-table'
import { type Aspect, byPrice, trialNames } from './trial'
import { type Progress, useOutcomes } from './use-outcomes'

const CoveringPlot = dynamic(() => import('./covering-plot'), { ssr: false })

export interface TryEveryProps {
  readonly session: WorkbookSession
  readonly asked: TryEveryEffect
  /** Sets one; the words of a refusal stay in the panel. */
  readonly onChoose: (trial: Trial) => string | undefined
  readonly onClose: () => void
  readonly onClosed: () => void
}

/** Every covering of the table on this very house, by price, yearly heat and winter light. Nothing changes until one is chosen. */
export function TryEvery({ session, asked, onChoose, onClose, onClosed }: TryEveryProps) {
  const { part, trials, now } = asked
  const names = useMemo(() => trialNames((name) => session.workbook.names.has(name)), [session])
  const progress = useOutcomes(session, trials, names)
  const [marked, setMarked] = useState<string | undefined>(now)
  const [problem, setProblem] = useState<string | undefined>(undefined)
  const figures = useMemo(() => figuresOf(session, names), [session, names])
  const sorted = byPrice(progress.outcomes)
  const points = sorted.flatMap(({ trial, price, heat, light }, i) =>
    price === undefined || heat === undefined
      ? []
      : [{ code: trial.code, number: i + 1, price, heat, light: light ?? 0, now: trial.code === now }],
  )
  return (
    <Panel
      title="Try every covering"
      about={`Each one on ${part}, with everything else as it is. Nothing changes until you choose one.`}
      wide
      onClose={onClose}
      onClosed={onClosed}
    >
      <ProgressLine progress={progress} total={trials.length} problem={problem} />
      <div className="flex min-h-0 flex-1 flex-col overflow-y-auto lg:flex-row lg:overflow-hidden">
        <figure className="m-0 flex shrink-0 flex-col px-2 pt-2 lg:w-[46%]">
          <figcaption className="px-3 text-[0.8125rem] text-quiet">
            {figures.heat.label}, {figures.heat.unit}. Larger discs let in more light in winter.
            {now === undefined ? '' : ' The heavy ring is what is there now.'}
          </figcaption>
          <div aria-hidden="true" className="h-56 w-full lg:h-auto lg:min-h-[24rem] lg:flex-1">
            {points.length > 0 ? (
              <CoveringPlot
                points={points}
                priceLabel={figures.price.label}
                heatLabel={figures.heat.label}
                showPrice={(value) => figures.price.show(value, 0)}
                showHeat={(value) => figures.heat.show(value, 0)}
                marked={marked}
                onMark={setMarked}
              />
            ) : null}
          </div>
        </figure>
        <OutcomeTable
          outcomes={sorted}
          figures={figures}
          now={now}
          marked={marked}
          mayChange={session.may.change}
          onMark={setMarked}
          onChoose={(trial) => setProblem(onChoose(trial))}
        />
      </div>
    </Panel>
  )
}

function ProgressLine({
  progress,
  total,
  problem,
}: {
  readonly progress: Progress
  readonly total: number
  readonly problem: string | undefined
}) {
  const { outcomes, running, stopped, cancel } = progress
  const done = outcomes.length
  const words = running
    ? `Trying ${Math.min(done + 1, total)} of ${total} …`
    : stopped
      ? `${stopped} ${done} of ${total} were tried.`
      : done < total
        ? `Stopped: ${done} of ${total} were tried.`
        : `All ${total} tried, the cheapest first.`
  return (
    <div className="flex min-h-12 flex-wrap items-center gap-x-4 gap-y-1 border-line border-b px-5 py-1.5 text-[0.875rem]">
      <p role="status">{words}</p>
      {running ? (
        <>
          <progress
            aria-label="Coverings tried"
            value={done}
            max={total}
            className="h-1.5 min-w-24 flex-1 accent-[var(--clay)]"
          />
          <Button className="min-h-8 px-3 py-0.5 text-[0.875rem]" onClick={cancel}>
            Stop
          </Button>
        </>
      ) : null}
      {problem ? (
        <p role="alert" className="text-ember">
          <span aria-hidden="true">! </span>
          {problem}
        </p>
      ) : null}
    </div>
  )
}

export interface FigureWords {
  readonly label: string
  readonly unit: string
  readonly show: (value: number, digits?: number) => string
}

/** Columns are narrow; the names in full stand in the workbook. */
const shortLabels: Readonly<Record<string, string>> = {
  quotation_total: 'Quotation',
  annual_heat_demand: 'Heat a year',
  annual_fuel_cost: 'Fuel a year',
  darkest_month_light: 'Winter light',
}

function figuresOf(
  session: WorkbookSession,
  names: ReturnType<typeof trialNames>,
): Readonly<Record<Aspect, FigureWords>> {
  const { system } = session.workbook
  const currency = currencyOf(session.named)
  const figure = (aspect: Aspect): FigureWords => {
    const named = session.workbook.names.get(names[aspect] ?? '')
    if (!named) return { label: 'not in this workbook', unit: '', show: () => '–' }
    const { quantity } = named
    return {
      label: shortLabels[named.name] ?? labelOf(named),
      unit: quantity === 'ratio' || isMoney(quantity) ? '' : unitOf(quantity, system).symbol,
      show: (value, digits = isMoney(quantity) ? 0 : undefined) =>
        formatQuantity(value, quantity, system, {
          unit: false,
          ...(digits === undefined ? {} : { digits }),
          ...(currency === undefined ? {} : { currency }),
        }),
    }
  }
  return { price: figure('price'), heat: figure('heat'), light: figure('light') }
}
