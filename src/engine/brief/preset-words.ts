/** What the presets that ship are called, what they are for, and where their limits come from in words of the trade. */
export interface PresetWords {
  readonly name: string;
  readonly use: string;
}

const words: Readonly<Record<string, PresetWords>> = {
  school: {
    name: 'School',
    use: 'Class rooms and halls in use by day. The limit follows the weather of the past month (ASHRAE 55); its ceiling, cap and tolerances are ours.',
  },
  office: { name: 'Office', use: 'Rooms held at a fixed temperature on weekdays. Customary values; no single source.' },
  clinic: {
    name: 'Clinic',
    use: 'Waiting and consulting rooms. Direct and two-stage cooling need a written reason, infection control signs off. Customary values; no single source.',
  },
  'hall-recommended': {
    name: 'Data hall, recommended',
    use: 'Equipment within the recommended envelope of ASHRAE TC 9.9, return air cooled through an exchanger.',
  },
  'hall-allowable': {
    name: 'Data hall, allowable A1',
    use: 'Equipment within the allowable envelope A1 of ASHRAE TC 9.9, derated with height.',
  },
  glasshouse: {
    name: 'Glasshouse',
    use: 'Pads and fans by daylight. Vapour pressure deficit: Konopacki et al.; airflow and rise: greenhouse trade guides, UF/IFAS AE069; the rest is ours.',
  },
  dairy: {
    name: 'Dairy',
    use: 'Cows under a temperature-humidity index (NRC 1971); 72 as the alarm: Brouk, Smith and Harner, Kansas State.',
  },
  broiler: {
    name: 'Broiler house',
    use: 'Older birds in tunnel ventilation. Pads from 28 °C, none over 80 % outdoor humidity: Czarick, University of Georgia; the rest is ours.',
  },
  warehouse: {
    name: 'Warehouse, factory',
    use: 'People at work in the shade. The shade heat figure is ours and stands for no measured index: measure on site.',
  },
  'process-water': {
    name: 'Process water',
    use: 'Cold water from a tower. 0.4 % of the hours is 35 h, as in ASHRAE design conditions; the rest is ours.',
  },
  'turbine-inlet': { name: 'Turbine inlet', use: 'Air drawn by a turbine, cooled to a target. All values are ours.' },
};

/** A preset that has no words of its own goes by its name. */
export function presetWords(id: string): PresetWords {
  return Object.hasOwn(words, id) ? (words[id] ?? { name: id, use: '' }) : { name: id, use: '' };
}
