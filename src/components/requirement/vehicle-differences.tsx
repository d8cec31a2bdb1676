import { formatFull } from '#contract/format.ts';
import type { StudyVehicle } from '#contract/requirement.ts';
import type { Clash } from './autosave.ts';

const LABELS: Record<string, string> = {
  name: 'Name',
  fairingKg: 'Fairing, kg',
  fairingLeavesAfterStage: 'Fairing leaves after stage',
  reserveMps: 'Reserve, m/s',
  'lossesMps.gravity': 'Gravity loss, m/s',
  'lossesMps.drag': 'Drag loss, m/s',
  'lossesMps.steering': 'Steering loss, m/s',
  count: 'Boosters',
  dryKg: 'Dry mass, kg',
  propellantKg: 'Propellant, kg',
  thrustVacKn: 'Thrust in vacuum, kN',
  ispVacS: 'Impulse in vacuum, s',
  ispSeaLevelS: 'Impulse at sea level, s',
};

/** Every figure of a vehicle under its path: "stages.0.dryKg". */
export function leavesOf(value: unknown, path = ''): Map<string, string> {
  if (value === null || value === undefined) return new Map();
  if (typeof value !== 'object')
    return new Map([[path, typeof value === 'number' ? formatFull(value) : String(value)]]);
  return new Map(
    Object.entries(value).flatMap(([key, child]) => [...leavesOf(child, path ? `${path}.${key}` : key)]),
  );
}

/** "Stage 1: Dry mass, kg" of "stages.0.dryKg". */
export function labelOf(path: string): string {
  const [head = '', ...rest] = path.split('.');
  if (head === 'stages') {
    const [index, field = ''] = rest;
    return `Stage ${Number(index) + 1}: ${LABELS[field] ?? field}`;
  }
  if (head === 'boosters') return `Boosters: ${LABELS[rest.join('.')] ?? rest.join('.')}`;
  return LABELS[path] ?? path;
}

/** Of one version of a vehicle, what differs from the other, a line each. */
export function differencesOf(version: Partial<StudyVehicle>, clash: Clash<StudyVehicle> | null) {
  const mine = leavesOf(clash?.mine.vehicle);
  const theirs = leavesOf(clash?.theirs.vehicle);
  const shown = leavesOf(version.vehicle);
  const paths = [...new Set([...mine.keys(), ...theirs.keys()])];
  const different = paths.filter((path) => mine.get(path) !== theirs.get(path));
  if (shown.size === 0) return 'no vehicle';
  return different.map((path) => (
    <span key={path} className="block">
      <span className="font-sans text-sm">{labelOf(path)}</span> {shown.get(path) ?? 'none'}
    </span>
  ));
}
