import { useWatch } from 'react-hook-form';
import { formatNumber } from '#contract/format.ts';
import { lossGuidanceMps } from '#contract/vehicle.ts';
import { Figure, type VehicleFormParts } from './Figure.tsx';

type Loss = keyof typeof lossGuidanceMps;

const LABELS: Record<Loss, string> = {
  gravity: 'Gravity loss',
  drag: 'Drag loss',
  steering: 'Steering loss',
};

/** What drag comes to on small vehicles. */
const MOST_DRAG_MPS = 400;

function guidance(loss: Loss): string {
  const [low, high] = lossGuidanceMps[loss];
  const usual = `Usual ${formatNumber(low)} to ${formatNumber(high)}`;
  return loss === 'drag' ? `${usual}, to ${MOST_DRAG_MPS} on small vehicles` : usual;
}

/** Said, not refused: a figure outside the usual range may be right for its vehicle. */
function remark(loss: Loss, value: unknown): string | undefined {
  const [low, usual] = lossGuidanceMps[loss];
  const high = loss === 'drag' ? MOST_DRAG_MPS : usual;
  if (typeof value !== 'number' || (value >= low && value <= high)) return undefined;
  return value < low ? 'Below the usual range' : 'Above the usual range';
}

/** Gravity, drag and steering, to burn-out near the parking altitude, with their usual ranges beside them. */
export function LossFields(parts: VehicleFormParts) {
  const losses = useWatch({ control: parts.form.control, name: 'lossesMps' });
  return (
    <div className="grid gap-4 phone:grid-cols-3">
      {(Object.keys(LABELS) as Loss[]).map((loss) => (
        <Figure
          key={loss}
          {...parts}
          name={`lossesMps.${loss}`}
          label={LABELS[loss]}
          unit="m/s"
          hint={guidance(loss)}
          reading={remark(loss, losses[loss])}
        />
      ))}
    </div>
  );
}
