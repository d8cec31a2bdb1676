/** The published sources of the method, keyed; constants and formulas name their key, the memo prints the rest. */
export const references = {
  wgs84: 'World Geodetic System 1984, NGA.STND.0036 (2014), defining and derived constants',
  cgpm1901:
    'Standard acceleration of gravity, 3rd General Conference on Weights and Measures (1901); ISO 80000-3',
  tropicalYear: 'Mean tropical year at J2000.0, 365.2421897 days of 86 400 s',
  visViva:
    'Bate, Mueller and White, Fundamentals of Astrodynamics (1971), chapter 1: energy and speed on a conic',
  secularNode:
    'Vallado, Fundamentals of Astrodynamics and Applications, 4th ed., chapter 9: secular rate of the node from J₂',
  launchAzimuth: 'Wertz and Larson, Space Mission Analysis and Design, 3rd ed., section 6.4: launch azimuth',
  planeChange:
    'Curtis, Orbital Mechanics for Engineering Students, chapter 6: plane changes combined with transfer burns',
  rocketEquation: 'Tsiolkovsky rocket equation over the burns of a staged vehicle',
  brent:
    'Brent, Algorithms for Minimization without Derivatives (1973), chapter 4: root of a bracketed function',
  keeneyRaiffa:
    'Keeney and Raiffa, Decisions with Multiple Objectives (1976): value functions and the additive value',
  goodwinWright:
    'Goodwin and Wright, Decision Analysis for Management Judgment, chapter 3: points made into weights that sum to 1',
} as const;

export type ReferenceKey = keyof typeof references;
