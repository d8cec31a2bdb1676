import papaparse from 'papaparse';
import type { TrajectoryPoint } from '#contract/ascent.ts';
import type { AscentPair } from '#contract/study-ascents.ts';
import type { PooledDb } from '#db/client.ts';
import { fileHeaders, flownTrajectory } from './flown-trajectory.ts';

/** A row of the file; the columns of the impact point are empty where there is none. */
const rowOf = ({ impact, ...point }: TrajectoryPoint) => ({
  time_s: point.timeS,
  latitude_deg: point.latitudeDeg,
  longitude_deg: point.longitudeDeg,
  altitude_m: point.altitudeM,
  relative_speed_mps: point.relativeSpeedMps,
  flight_path_deg: point.flightPathDeg,
  heading_deg: point.headingDeg,
  mass_kg: point.massKg,
  dynamic_pressure_pa: point.dynamicPressurePa,
  acceleration_mps2: point.accelerationMps2,
  impact_kind: impact.kind,
  impact_latitude_deg: impact.kind === 'impact' ? impact.latitudeDeg : '',
  impact_longitude_deg: impact.kind === 'impact' ? impact.longitudeDeg : '',
  impact_time_s: impact.kind === 'impact' ? impact.timeS : '',
});

/**
 * One flown ascent's trajectory as CSV (RFC 4180), a row a moment, every digit kept.
 * @throws AppError 'not-found'
 */
export async function exportTrajectoryCsv(
  db: PooledDb,
  which: AscentPair & { studyId: string },
): Promise<Response> {
  const flown = await flownTrajectory(db, which);
  const text = papaparse.unparse(flown.points.map(rowOf));
  return new Response(`${text}\r\n`, {
    headers: fileHeaders(flown, { type: 'text/csv; charset=utf-8', extension: 'csv' }),
  });
}
