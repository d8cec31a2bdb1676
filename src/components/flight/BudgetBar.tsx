import type { OrbitResult } from '#contract/evaluate.ts';
import { formatNumber } from '#contract/format.ts';
import type { VehicleInput } from '#contract/vehicle.ts';
import { budgetParts, type BudgetPart, type BudgetScale } from './budget.ts';

export const BAR_WIDTH = 520;
const HEIGHT = 20;
const GAP = 1;

export const barAt = (scale: BudgetScale, mps: number): number =>
  ((mps - scale.low) / (scale.high - scale.low)) * BAR_WIDTH;

const tornLeft = (to: number): string => `M0 0H${to}V${HEIGHT}H0L4 15 0 10 4 5Z`;

/** The paint of a part: a class for a tint, a fill for a pattern. */
export function partFill(paint: BudgetPart['paint'], patterns: string) {
  return paint.startsWith('fill-')
    ? { className: paint }
    : { className: 'part-outline', fill: `url(#${patterns}-${paint})` };
}

interface BudgetBarProps {
  result: OrbitResult;
  losses: VehicleInput['lossesMps'] | null;
  scale: BudgetScale;
  patterns: string;
}

/** Off the scale a bar is torn at both ends and carries its figure in words. */
function OffScale({ words, patterns }: { words: string; patterns: string }) {
  return (
    <>
      <path
        d={`M0 0H${BAR_WIDTH - 4}L${BAR_WIDTH} 5 ${BAR_WIDTH - 4} 10 ${BAR_WIDTH} 15 ${BAR_WIDTH - 4} ${HEIGHT}H0L4 15 0 10 4 5Z`}
        fill={`url(#${patterns}-cut)`}
        className="stroke-field"
      />
      <text x={BAR_WIDTH / 2} y="14" textAnchor="middle" className="halo">
        {words}
      </text>
    </>
  );
}

function Parts({ parts, scale, patterns }: { parts: BudgetPart[]; scale: BudgetScale; patterns: string }) {
  let reached = 0;
  return parts.map((part) => {
    const from = Math.max(0, barAt(scale, reached));
    reached += part.mps;
    const to = barAt(scale, reached);
    if (part.mps <= 0 || to <= 0) return null;
    const paint = partFill(part.paint, patterns);
    return from === 0 ? (
      <path key={part.name} d={tornLeft(to)} {...paint} />
    ) : (
      <rect
        key={part.name}
        x={from + GAP}
        width={Math.max(to - from - GAP, 0.5)}
        height={HEIGHT}
        {...paint}
      />
    );
  });
}

/** One site's Δv budget on the common axis. The figures stand beside it, so it is hidden from screen readers. */
export function BudgetBar({ result, losses, scale, patterns }: BudgetBarProps) {
  if (result.way === 'out-of-reach') return null;
  const { total, dogleg, planeChange } = result.deltaVMps;
  const turn =
    dogleg > planeChange ? `dogleg ${formatNumber(dogleg)}` : `plane change ${formatNumber(planeChange)}`;
  return (
    <svg
      className="chart"
      width={BAR_WIDTH}
      height={HEIGHT}
      viewBox={`0 0 ${BAR_WIDTH} ${HEIGHT}`}
      aria-hidden="true"
    >
      {scale.ticks.map((tick) => (
        <path key={tick} className="grid-line" d={`M${barAt(scale, tick)} -14V34`} />
      ))}
      {total > scale.high ? (
        <OffScale words={`${turn} m/s, off this scale`} patterns={patterns} />
      ) : (
        <Parts parts={budgetParts(result, losses)} scale={scale} patterns={patterns} />
      )}
    </svg>
  );
}
