/** The most points a criterion can be given; apart from the schemas, so that an island need not carry them. */
export const MOST_POINTS = 100;
