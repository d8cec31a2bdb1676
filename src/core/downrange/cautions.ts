/** The edition of the regulation that the corridor and its tables follow. */
export const REGULATION = '14 CFR part 420, appendices A and C (text as of August 2026)';

/** What stands wherever a corridor or a figure from one is shown or printed. */
export const cautions: readonly string[] = [
  'Screening only, not a flight safety analysis, and no approval of any kind: the regulator’s own method and licensed flight-safety analysts decide. Every result needs review by a qualified range-safety analyst.',
  'The corridor takes a straight ground track: no winds, dogleg, malfunction turn or trajectory. Real corridors differ.',
  'The vehicle class is inferred from payload, and the probability of failure is the prescribed 0.10, not the vehicle’s.',
  'Settlements are single points and hold under half of the world’s people; the rest are spread evenly over each country’s land, an assumption. Ships, aircraft, offshore platforms and seasonal people are not included.',
  'The coastline is quantised to 200 to 400 m, and islands below the data’s scale are missing. Clear means that no intersection was found at this resolution.',
  'Impact zones of stages and fairings, and toxic and blast effects far afield, are not covered.',
  'Other countries’ rules differ; the United States tables serve as a common yardstick.',
];
