import type { Verification } from './figure.ts';

type PowerLineTable = {
  /** The profile ids that this table serves; the first is its own name. */
  profiles: readonly [string, ...string[]];
  name: string;
  source: string;
  verified: Verification;
  /** Up to and including this voltage, keep this far off. */
  rows: readonly { upToKv: number; distanceM: number }[];
  /** What holds above the last row. */
  above: string;
  notes: readonly string[];
};

const feet = (ft: number): number => ft * 0.3048;

export const powerLineTables: readonly PowerLineTable[] = [
  {
    profiles: ['us'],
    name: 'United States, cranes and equipment',
    source: '29 CFR 1926.1408 Table A',
    verified: 'law',
    rows: [
      { upToKv: 50, distanceM: feet(10) },
      { upToKv: 200, distanceM: feet(15) },
      { upToKv: 350, distanceM: feet(20) },
      { upToKv: 500, distanceM: feet(25) },
      { upToKv: 750, distanceM: feet(35) },
      { upToKv: 1000, distanceM: feet(45) },
    ],
    above: 'the line’s owner or a qualified engineer sets the distance',
    notes: [
      'If any part could come within 20 ft (6.1 m) of a line to 350 kV, or 50 ft (15.2 m) above that, the encroachment steps must be taken first.',
    ],
  },
  {
    profiles: ['au', 'au-model'],
    name: 'Australia, ordinary people and plant, where the state has no table here',
    source: 'Work near overhead power lines, code of practice (NSW 2006)',
    verified: 'memory',
    rows: [
      { upToKv: 132, distanceM: 3 },
      { upToKv: 330, distanceM: 6 },
      { upToKv: 500, distanceM: 8 },
    ],
    above: 'ask the line’s owner',
    notes: [
      'States differ, and Queensland sets other distances for plant: confirm with the local regulator and the line’s owner.',
    ],
  },
  {
    profiles: ['au-sa'],
    name: 'South Australia, anyone',
    source: 'Electricity (General) Regulations 2012 (SA) reg 64(3), sa.gov.au table',
    verified: 'regulator',
    rows: [
      { upToKv: 33, distanceM: 3 },
      { upToKv: 66, distanceM: 4 },
      { upToKv: 132, distanceM: 5 },
      { upToKv: 275, distanceM: 6 },
    ],
    above: 'ask the line’s owner',
    notes: [
      'For people and what they hold; cranes and elevating plant have distances of their own. A voltage between two of the table takes the higher one’s distance.',
    ],
  },
  {
    profiles: ['au-vic'],
    name: 'Victoria, no-go zone',
    source: 'Energy Safe Victoria no-go zones: 3 m from lines on poles, 8 m from lines on towers (132 kV up)',
    verified: 'secondary',
    rows: [
      { upToKv: 66, distanceM: 3 },
      { upToKv: 500, distanceM: 8 },
    ],
    above: 'ask the line’s owner',
    notes: [
      'A registered spotter from 3 to 6.4 m (poles) and from 8 to 10 m (towers). Never above or below the line without the owner’s permission.',
      'The rule goes by pole or tower, not by voltage: a line on a tower is 8 m whatever its voltage.',
    ],
  },
  {
    profiles: ['nz'],
    name: 'New Zealand, mobile plant and people',
    source: 'NZECP 34:2001 section 5.2.1, quoted by a line company',
    verified: 'secondary',
    rows: [{ upToKv: 110, distanceM: 4 }],
    above: 'ask the line’s owner',
    notes: ['Closer only with the line owner’s written consent.'],
  },
  {
    profiles: ['ca-ab'],
    name: 'Alberta, people and equipment',
    source: 'Alberta OHS Code section 225, Schedule 4 (explanation guide, 2009)',
    verified: 'regulator',
    rows: [
      { upToKv: 0.75, distanceM: 1 },
      { upToKv: 40, distanceM: 3 },
      { upToKv: 72, distanceM: 3.5 },
      { upToKv: 144, distanceM: 4 },
      { upToKv: 260, distanceM: 5 },
      { upToKv: 500, distanceM: 7 },
    ],
    above: 'ask the line’s operator',
    notes: [
      'Bare lines. Keep 7 m until the line’s operator has confirmed the voltage. A voltage between two of the table takes the higher one’s distance.',
    ],
  },
  {
    profiles: ['ca-on'],
    name: 'Ontario',
    source:
      'O. Reg. 213/91 section 188 from 750 V (its distances as line companies print them, who add 1 m below 750 V)',
    verified: 'secondary',
    rows: [
      { upToKv: 0.75, distanceM: 1 },
      { upToKv: 150, distanceM: 3 },
      { upToKv: 250, distanceM: 4.5 },
      { upToKv: 1000, distanceM: 6 },
    ],
    above: 'ask the line’s owner',
    notes: [],
  },
];

/** The table of a profile: its own, else that of the place it lies in (`au-nsw` takes `au`). */
export function powerLineTableFor(profile: string): { table: PowerLineTable; own: boolean } | null {
  for (let id = profile; id !== ''; id = id.slice(0, Math.max(0, id.lastIndexOf('-')))) {
    const table = powerLineTables.find(({ profiles }) => profiles.includes(id));
    if (table) return { table, own: id === profile };
  }
  return null;
}
