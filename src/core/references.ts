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

/** Sources of the weighing methods beyond the additive value. */
export const weighingReferences = {
  saaty: 'Saaty, The Analytic Hierarchy Process (1980): pairwise comparison, random indices',
  hwangYoon: 'Hwang and Yoon, Multiple Attribute Decision Making (1981): closeness to the ideal (TOPSIS)',
  lahdelmaSalminen:
    'Lahdelma and Salminen, SMAA-2: stochastic multicriteria acceptability analysis for group decision making (2001)',
  tervonenLahdelma:
    'Tervonen and Lahdelma, Implementing stochastic multicriteria acceptability analysis (2007): weights uniform on the simplex and its parts',
  steinKeblis: 'Stein and Keblis, A new method to simulate the triangular distribution (2009)',
  blackmanVigna:
    'Blackman and Vigna, Scrambled linear pseudorandom number generators (2021): xoshiro128** 1.1, seeded by SplitMix64',
  kendall: 'Kendall, Rank Correlation Methods (1948): coefficient of concordance with ties corrected',
} as const;

/** Sources of the further ways in which a study's weights are set and its ranking is tried. */
export const studyReferences = {
  edwardsBarron:
    'Edwards and Barron, SMARTS and SMARTER: improved simple methods for multiattribute utility measurement (1994): swing weights',
  barronBarrett:
    'Barron and Barrett, Decision quality using ranked attribute weights (1996): rank-order centroid weights',
  clemen:
    'Clemen, Making Hard Decisions (1996), chapter 5: one uncertain figure at a time, drawn as a tornado',
} as const;

/** Sources of the flown ascent and of impact points. */
export const ascentReferences = {
  standardAtmosphere:
    'U.S. Standard Atmosphere 1976 (NOAA-S/T 76-1562): layers to 86 km, Table I to 1,000 km',
  pointMass:
    'Curtis, Orbital Mechanics for Engineering Students, chapter 13: rocket dynamics over a round Earth, gravity turn',
  oblateGravity:
    'Vallado, Fundamentals of Astrodynamics and Applications, 4th ed., chapter 8: acceleration from J₂',
  rungeKutta:
    'Hairer, Nørsett and Wanner, Solving Ordinary Differential Equations I, chapter II.1: order four',
  linearTangent: 'Bryson and Ho, Applied Optimal Control (1975), section 2.4: linear-tangent steering',
  reducedHessian:
    'Nocedal and Wright, Numerical Optimization, 2nd ed., chapters 6 and 18: BFGS, reduced-Hessian methods',
  ascentBenchmark:
    'Betts, Practical Methods for Optimal Control (2010), example 6.15: four-phase ascent to a transfer ellipse',
  impactPoint:
    '14 CFR Part 420, Appendix B, equations B46 to B69: impact point on the ellipsoid along a Keplerian arc',
} as const;

/** Sources of the downrange screening. */
export const downrangeReferences = {
  part420:
    '14 CFR part 420 (United States), sections 420.19 to 420.25: classes of launch vehicles, site location review',
  appendixA: '14 CFR part 420, appendix A: flight corridor without a trajectory, tables A-1 to A-3',
  appendixC: '14 CFR part 420, appendix C: casualty expectation, tables C-2 and C-3',
  karney: 'Karney, Algorithms for geodesics, Journal of Geodesy 87 (2013): geodesics on the ellipsoid',
  snyder:
    'Snyder, Map Projections: A Working Manual, USGS Professional Paper 1395 (1987), equation 3-12: authalic latitude',
} as const;

export type ReferenceKey = keyof typeof references;
