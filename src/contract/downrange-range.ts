/** How far corridors and fans run, km: 20 to 5,000 nautical miles. */
export const SHORTEST_KM = 37.04;
export const LONGEST_KM = 9260;
