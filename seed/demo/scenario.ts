import { people } from './people.ts';
import { secondSite } from './second-site.ts';
import type { Scenario } from './shape.ts';
import { smallPads } from './small-pads.ts';

/** The demo: an invented operator and its two trade studies. */
export const scenario: Scenario = { people, studies: [secondSite, smallPads] };
