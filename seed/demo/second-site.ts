import type { DemoCriterion, DemoSite, DemoStudy } from './shape.ts';

/*
 * The main study of the demo. Operator, question, site names and every entered figure are invented; the coasts and
 * islands are real. None of the places is, or lies within 100 km of, a launch site that exists.
 */

const orbits: DemoStudy['orbits'] = [
  {
    code: 'LOW',
    name: 'Low inclination',
    perigeeKm: 550,
    apogeeKm: 550,
    inclinationDeg: 18,
    flightsPerYear: 2,
  },
  {
    code: 'STN',
    name: 'Station supply',
    perigeeKm: 420,
    apogeeKm: 420,
    inclinationDeg: 51.6,
    flightsPerYear: 4,
  },
  {
    code: 'SSO',
    name: 'Sun-synchronous',
    perigeeKm: 600,
    apogeeKm: 600,
    sunSynchronous: true,
    flightsPerYear: 3,
  },
  {
    code: 'GTO',
    name: 'Geostationary transfer',
    perigeeKm: 250,
    apogeeKm: 35_786,
    inclinationDeg: 6,
    flightsPerYear: 2,
  },
  { code: 'POL', name: 'Polar', perigeeKm: 800, apogeeKm: 800, inclinationDeg: 90, flightsPerYear: 1 },
];

const criteria: DemoCriterion[] = [
  {
    key: 'payload',
    source: 'computed',
    quantity: 'payload-per-year',
    levels: { mode: 'fixed', worst: 40, best: 95 },
    limit: { kind: 'at-least', value: 45 },
  },
  { key: 'turn', source: 'computed', quantity: 'turn', levels: { mode: 'fixed', worst: 60, best: 0 } },
  {
    key: 'port',
    source: 'entered',
    name: 'Nearest port',
    unit: 'km',
    direction: 'less',
    levels: { mode: 'fixed', worst: 400, best: 0 },
  },
  {
    key: 'cost',
    source: 'entered',
    name: 'Cost to first launch',
    unit: 'M€',
    direction: 'less',
    levels: { mode: 'fixed', worst: 400, best: 200 },
  },
  {
    key: 'time',
    source: 'entered',
    name: 'Time to first launch',
    unit: 'months',
    direction: 'less',
    levels: { mode: 'fixed', worst: 60, best: 36 },
  },
  {
    key: 'days',
    source: 'entered',
    name: 'Launch days a year',
    unit: 'days',
    direction: 'more',
    levels: { mode: 'fixed', worst: 140, best: 300 },
    limit: { kind: 'at-least', value: 160 },
  },
  {
    key: 'access',
    source: 'rating',
    name: 'Access',
    steps: ['Sea only', 'Track', 'Road in season', 'Road all year', 'Road and airfield'],
  },
];

/* Where the invented figures are said to come from; distances to ports and some ratings have no source yet. */
const COST_MODEL = 'Ground-works cost model, issue 3';
const SCHEDULE = 'Permits and works schedule, issue 2';
const WEATHER = 'Weather desk study, ten years of hourly data';
const VISIT = 'Site visit, September 2026';

const sites: DemoSite[] = [
  {
    code: 'PV',
    name: 'Ponta do Vigia',
    latitudeDeg: -4.7418,
    longitudeDeg: -37.3014,
    elevationM: 14,
    permittedAzimuthsDeg: [[325, 92]],
    notes: 'Brazil, north-east coast',
    values: { port: 160, cost: 344, time: 50, days: 288, access: 3 },
    particulars: {
      cost: { low: 320, high: 382, source: COST_MODEL, date: '2026-10-02', confidence: 'medium' },
      time: { low: 46, high: 58, source: SCHEDULE, date: '2026-10-16', confidence: 'medium' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
      access: { source: VISIT, date: '2026-09-14', confidence: 'high' },
    },
  },
  {
    code: 'ES',
    name: 'Essery Bank',
    latitudeDeg: 7.3306,
    longitudeDeg: -58.5002,
    elevationM: 6,
    permittedAzimuthsDeg: [[342, 95]],
    notes: 'Guyana, Atlantic coast',
    values: { port: 75, cost: 334, time: 52, days: 231, access: 2 },
    particulars: {
      cost: { low: 314, high: 379, source: COST_MODEL, date: '2026-10-02', confidence: 'medium' },
      time: { low: 48, high: 61, source: SCHEDULE, date: '2026-10-16', confidence: 'medium' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
      access: { source: VISIT, date: '2026-09-14', confidence: 'high' },
    },
  },
  {
    code: 'TH',
    name: 'Tern Head',
    latitudeDeg: -14.9631,
    longitudeDeg: 145.3318,
    elevationM: 31,
    permittedAzimuthsDeg: [[46, 112]],
    notes: 'Australia, Coral Sea',
    values: { port: 215, cost: 341, time: 47, days: 262, access: 3 },
    particulars: {
      cost: { low: 323, high: 371, source: COST_MODEL, date: '2026-10-02', confidence: 'high' },
      time: { low: 44, high: 53, source: SCHEDULE, date: '2026-10-16', confidence: 'high' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
      access: { source: VISIT, date: '2026-09-14', confidence: 'high' },
    },
  },
  {
    code: 'PR',
    name: 'Pointe Rovana',
    latitudeDeg: -17.6484,
    longitudeDeg: 49.4821,
    elevationM: 22,
    permittedAzimuthsDeg: [[40, 190]],
    notes: 'Madagascar, east coast',
    values: { port: 58, cost: 259, time: 58, days: 226, access: 1 },
    particulars: {
      cost: { low: 237, high: 329, source: COST_MODEL, date: '2026-10-02', confidence: 'low' },
      time: { low: 53, high: 72, source: SCHEDULE, date: '2026-10-16', confidence: 'low' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
    },
  },
  {
    code: 'RD',
    name: 'Ras Dumeni',
    latitudeDeg: -2.2655,
    longitudeDeg: 40.9287,
    elevationM: 9,
    permittedAzimuthsDeg: [[75, 152]],
    notes: 'Kenya, north coast',
    values: { port: 225, cost: 305, time: 50, days: 276, access: 3 },
    particulars: {
      cost: { low: 280, high: 357, source: COST_MODEL, date: '2026-10-02', confidence: 'low' },
      time: { low: 46, high: 60, source: SCHEDULE, date: '2026-10-16', confidence: 'low' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
    },
  },
  {
    code: 'PL',
    name: 'Punta Liwan',
    latitudeDeg: 16.3827,
    longitudeDeg: 122.2109,
    elevationM: 48,
    permittedAzimuthsDeg: [[62, 132]],
    notes: 'Philippines, east Luzon. The cost estimate is due in January.',
    values: { port: 120, time: 49, days: 203, access: 3 },
    particulars: {
      time: { low: 45, high: 58, source: SCHEDULE, date: '2026-10-16', confidence: 'medium' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
    },
  },
  {
    code: 'MP',
    name: 'Malewa Point',
    latitudeDeg: 5.312,
    longitudeDeg: 163.008,
    elevationM: 11,
    permittedAzimuthsDeg: [
      [20, 130],
      [170, 220],
    ],
    notes: 'Micronesia, Kosrae',
    values: { port: 12, cost: 388, time: 57, days: 219, access: 1 },
    particulars: {
      cost: { low: 358, high: 448, source: COST_MODEL, date: '2026-10-02', confidence: 'low' },
      time: { low: 51, high: 69, source: SCHEDULE, date: '2026-10-16', confidence: 'low' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
    },
  },
  {
    code: 'AR',
    name: 'Ponta Arruda',
    latitudeDeg: 39.463,
    longitudeDeg: -31.208,
    elevationM: 85,
    permittedAzimuthsDeg: [[10, 265]],
    notes: 'Portugal, western Azores',
    values: { port: 9, cost: 268, time: 44, days: 182, access: 2 },
    particulars: {
      cost: { low: 254, high: 292, source: COST_MODEL, date: '2026-10-02', confidence: 'high' },
      time: { low: 42, high: 49, source: SCHEDULE, date: '2026-10-16', confidence: 'high' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
      access: { source: VISIT, date: '2026-09-14', confidence: 'high' },
    },
  },
  {
    code: 'PB',
    name: 'Petrel Bluff',
    latitudeDeg: -44.0163,
    longitudeDeg: -176.3741,
    elevationM: 67,
    permittedAzimuthsDeg: [],
    notes: 'New Zealand, Chatham Islands',
    values: { port: 24, cost: 372, time: 55, days: 176, access: 1 },
    particulars: {
      cost: { low: 352, high: 420, source: COST_MODEL, date: '2026-10-02', confidence: 'medium' },
      time: { low: 51, high: 64, source: SCHEDULE, date: '2026-10-16', confidence: 'medium' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
    },
  },
  {
    code: 'CD',
    name: 'Cape Dorlan',
    latitudeDeg: 48.6209,
    longitudeDeg: -53.0117,
    elevationM: 52,
    permittedAzimuthsDeg: [[35, 178]],
    notes: 'Canada, Newfoundland',
    values: { port: 140, cost: 271, time: 39, days: 168, access: 4 },
    particulars: {
      cost: { low: 259, high: 297, source: COST_MODEL, date: '2026-10-02', confidence: 'high' },
      time: { low: 37, high: 44, source: SCHEDULE, date: '2026-10-16', confidence: 'high' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
      access: { source: VISIT, date: '2026-09-14', confidence: 'high' },
    },
  },
  {
    code: 'CA',
    name: 'Cabo Almarza',
    latitudeDeg: -54.8612,
    longitudeDeg: -65.4127,
    elevationM: 38,
    permittedAzimuthsDeg: [[350, 170]],
    notes: 'Argentina, Tierra del Fuego',
    values: { port: 185, cost: 296, time: 52, days: 164, access: 0 },
    particulars: {
      cost: { low: 276, high: 340, source: COST_MODEL, date: '2026-10-02', confidence: 'medium' },
      time: { low: 48, high: 62, source: SCHEDULE, date: '2026-10-16', confidence: 'medium' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
    },
  },
  {
    code: 'SK',
    name: 'Skarvnes',
    latitudeDeg: 70.2211,
    longitudeDeg: 21.2642,
    elevationM: 40,
    permittedAzimuthsDeg: [[300, 20]],
    notes: 'Norway, Finnmark coast',
    values: { port: 95, cost: 204, time: 34, days: 149, access: 3 },
    particulars: {
      cost: { low: 196, high: 218, source: COST_MODEL, date: '2026-10-02', confidence: 'high' },
      time: { low: 33, high: 37, source: SCHEDULE, date: '2026-10-16', confidence: 'high' },
      days: { source: WEATHER, date: '2026-08-21', confidence: 'high' },
      access: { source: VISIT, date: '2026-09-14', confidence: 'high' },
    },
  },
];

export const secondSite: DemoStudy = {
  title: 'Second launch site, 2031 manifest',
  organisation: 'Quillon Launch',
  question: 'From which of twelve places should Rowan M fly the 2031 manifest?',
  decideBy: '2027-01-29',
  vehicleCode: 'ROWAN-M',
  members: [
    { login: 'lead', role: 'lead' },
    { login: 'engineer', role: 'engineer' },
    { login: 'reviewer', role: 'reviewer' },
    { login: 'reader', role: 'reader' },
  ],
  orbits,
  criteria,
  sites,
  points: { payload: 28, turn: 8, port: 8, cost: 24, time: 12, days: 12, access: 8 },
  ownPoints: [
    {
      login: 'engineer',
      shared: true,
      points: { payload: 35, turn: 15, port: 5, cost: 20, time: 10, days: 10, access: 5 },
    },
    {
      login: 'reviewer',
      shared: true,
      points: { payload: 20, turn: 5, port: 10, cost: 30, time: 20, days: 10, access: 5 },
    },
  ],
};
