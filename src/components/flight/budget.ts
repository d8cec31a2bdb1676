import type { FlownOrbit, OrbitResult } from '#contract/evaluate.ts';
import type { VehicleInput } from '#contract/vehicle.ts';

export type Paint = 'fill-1' | 'fill-2' | 'fill-3' | 'fill-open' | 'hatched' | 'crossed' | 'dotted';

/** One line of a Δv budget as it is drawn. */
export interface BudgetPart {
  name: string;
  mps: number;
  paint: Paint;
}

type Losses = VehicleInput['lossesMps'];

/** The lines of a budget in drawing order. */
export const BUDGET_LINES = [
  { name: 'required speed', paint: 'fill-1' },
  { name: 'gravity', paint: 'fill-2' },
  { name: 'drag', paint: 'fill-3' },
  { name: 'steering', paint: 'fill-3' },
  { name: 'dogleg', paint: 'hatched' },
  { name: 'plane change', paint: 'crossed' },
  { name: 'transfer', paint: 'dotted' },
  { name: 'reserve', paint: 'fill-open' },
] as const satisfies { name: string; paint: Paint }[];

/** A result's budget line by line; the losses by kind, as the vehicle enters them. */
export function budgetParts({ deltaVMps: dv }: FlownOrbit, losses: Losses | null): BudgetPart[] {
  const { gravity, drag, steering } = losses ?? { gravity: 0, drag: 0, steering: 0 };
  const mps = [dv.required, gravity, drag, steering, dv.dogleg, dv.planeChange, dv.transfer, dv.reserve];
  return BUDGET_LINES.map((line, i) => ({ ...line, mps: mps[i] ?? 0 }));
}

export interface BudgetScale {
  low: number;
  high: number;
  ticks: number[];
}

const STEP_MPS = 500;
const LEAST_SPAN_MPS = 3_000;
const LONGEST_SPAN_MPS = 5_000;

/** The axis is cut below the least required speed, and ends before a few far totals would press the rest together. */
export function budgetScale(results: readonly OrbitResult[]): BudgetScale {
  const flown = results.filter((result) => result.way !== 'out-of-reach');
  const least = Math.min(...flown.map((result) => result.deltaVMps.required));
  const most = Math.max(...flown.map((result) => result.deltaVMps.total));
  const low = flown.length === 0 ? 7_000 : Math.max(0, Math.floor((least - 300) / STEP_MPS) * STEP_MPS);
  const wanted = flown.length === 0 ? LEAST_SPAN_MPS : most + 200 - low;
  const span = Math.min(Math.max(wanted, LEAST_SPAN_MPS), LONGEST_SPAN_MPS);
  const high = low + Math.ceil(span / STEP_MPS) * STEP_MPS;
  const ticks = Array.from({ length: (high - low) / STEP_MPS }, (_, i) => low + (i + 1) * STEP_MPS);
  return { low, high, ticks: ticks.length > 6 ? ticks.filter((tick) => tick % 1_000 === 0) : ticks };
}
