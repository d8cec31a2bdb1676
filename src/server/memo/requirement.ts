import { decimalsNeeded } from '#core/printed/figure.ts';
import { toDegrees } from '#core/units.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { MemoBlock, MemoTable } from '#contract/memo.ts';
import type { InputOrbit } from '#contract/study-inputs.ts';
import { inclinationOf } from '#contract/to-core.ts';
import type { VehicleInput } from '#contract/vehicle.ts';
import { cell, figure, figures, row, table, words } from './cells.ts';
import type { MemoFacts } from './facts.ts';

const needed = (value: number, least = 0): string =>
  formatNumber(value, Math.max(least, decimalsNeeded([value])));

function orbitsTable(orbits: readonly InputOrbit[]): MemoTable {
  const flights = decimalsNeeded(orbits.map(({ flightsPerYear }) => flightsPerYear));
  return table(
    'The manifest',
    [
      words('Code', 9, true),
      words('Target orbit', 26, true),
      figures('Perigee', 'km', 11),
      figures('Apogee', 'km', 11),
      figures('Inclination', '°', 12, true),
      words('Profile', 11),
      figures('Parking orbit', 'km', 11),
      figures('Flights', 'a year', 9, true),
    ],
    orbits.map((orbit) => {
      const inclination = orbit.inclinationDeg ?? toDegrees(inclinationOf(orbit));
      const entered = orbit.inclinationDeg !== undefined;
      return row([
        cell(orbit.code),
        cell(orbit.name === '' ? '–' : orbit.name),
        cell(needed(orbit.perigeeKm)),
        cell(needed(orbit.apogeeKm)),
        cell(entered ? needed(inclination, 1) : formatNumber(inclination, 3)),
        cell(`${orbit.profile}${entered ? '' : ', sun-synchronous'}`),
        cell(needed(orbit.parkingKm)),
        cell(figure(orbit.flightsPerYear, flights)),
      ]);
    }),
    [
      'Altitudes count from the equatorial radius. A sun-synchronous orbit’s inclination follows from J₂ and the tropical year.',
    ],
  );
}

function stagesTable({ boosters, stages }: VehicleInput): MemoTable {
  const burns = [
    ...(boosters && boosters.count > 0 ? [{ name: `Boosters, each of ${boosters.count}`, ...boosters }] : []),
    ...stages.map((stage, at) => ({ name: `Stage ${at + 1}`, ...stage })),
  ];
  return table(
    'The vehicle’s stages',
    [
      words('Stage', 26, true),
      figures('Dry mass', 'kg', 14, true),
      figures('Propellant', 'kg', 15, true),
      figures('Thrust, vacuum', 'kN', 14),
      figures('Specific impulse, vacuum', 's', 16),
      figures('Specific impulse, sea level', 's', 16),
    ],
    burns.map((burn) =>
      row([
        cell(burn.name),
        cell(needed(burn.dryKg)),
        cell(needed(burn.propellantKg)),
        cell(needed(burn.thrustVacKn)),
        cell(needed(burn.ispVacS)),
        cell(burn.ispSeaLevelS === undefined ? '–' : needed(burn.ispSeaLevelS)),
      ]),
    ),
    boosters && boosters.count > 0 ? ['Booster masses and thrust are for one booster.'] : [],
  );
}

/** Everything else that the figures rest on, one assumption a row. */
function assumptionsTable({ inputs, flown }: MemoFacts): MemoTable {
  const { vehicle, settings } = inputs;
  const loss = flown === null ? 'entered with the vehicle' : 'entered; not used, losses are flown';
  const mps = (name: string, value: number, source: string) =>
    row([cell(name), cell(`${needed(value)} m/s`), cell(source)]);
  const rows = vehicle
    ? [
        mps('Gravity loss', vehicle.lossesMps.gravity, loss),
        mps('Drag loss', vehicle.lossesMps.drag, loss),
        mps('Steering loss', vehicle.lossesMps.steering, loss),
        mps('Reserve', vehicle.reserveMps, 'entered with the vehicle'),
        row([
          cell('Fairing'),
          cell(`${needed(vehicle.fairingKg)} kg`),
          cell(`leaves at the end of the burn of stage ${vehicle.fairingLeavesAfterStage}`),
        ]),
      ]
    : [];
  return table(
    'Losses, reserve and settings',
    [words('Assumption', 40, true), figures('Figure', '', 20, true), words('Where from', 40)],
    [
      ...rows,
      row([
        cell('Share of the injection speed flown at a turn, up to 7° of arc'),
        cell(needed(settings.turnSpeedFraction, 1)),
        cell('setting of the study'),
      ]),
    ],
    [
      'Entered losses belong to a burn-out at about the parking altitude; back-pressure is in the blended specific impulse of the first burn and in no loss.',
    ],
  );
}

/** The requirement and every assumption of it: manifest, vehicle, losses, settings. */
export function requirementBlocks(facts: MemoFacts): MemoBlock[] {
  const { orbits, vehicle } = facts.inputs;
  const name = vehicle?.name ?? vehicle?.code ?? 'without a name';
  return [
    ...(orbits.length === 0
      ? [{ kind: 'paragraph' as const, text: ['The manifest has no target orbits yet.'] }]
      : [orbitsTable(orbits)]),
    {
      kind: 'paragraph',
      text: vehicle
        ? [
            { strong: `Vehicle: ${name}` },
            `, ${formatCount(vehicle.stages.length, 'stage')}${vehicle.boosters && vehicle.boosters.count > 0 ? ` and ${formatCount(vehicle.boosters.count, 'booster')}` : ''}.`,
          ]
        : ['No vehicle is chosen yet: losses and reserve count as 0, and there is no payload.'],
    },
    ...(vehicle ? [stagesTable(vehicle)] : []),
    assumptionsTable(facts),
  ];
}
