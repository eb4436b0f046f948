/** The ways of the keyboard over the map page, part by part in the order of the Tab key. */
export interface WalkStop {
  readonly part: string;
  readonly keys: string;
}

export const KEYBOARD_WALK: readonly WalkStop[] = [
  { part: 'Find a place or a position', keys: 'Type, then the down arrow and Enter' },
  { part: 'Brief', keys: 'Arrow keys choose another' },
  { part: 'Sliders', keys: 'Arrow keys move one a step; in the field beside it a value is typed' },
  { part: 'Ranking', keys: 'Up and down go along it, Enter chooses' },
  { part: 'Map', keys: 'Arrow keys move it, plus and minus zoom' },
  {
    part: 'Sites on the map, stations on the map',
    keys: 'Arrow keys, Home, End or the first letter of a name go to one, Enter chooses it',
  },
  { part: 'Zoom buttons', keys: 'Enter presses; the last one shows everything' },
  { part: 'Layer', keys: 'Arrow keys choose another' },
  { part: 'Ledger', keys: 'Enter on a class lists its hours' },
  {
    part: 'Year cloth',
    keys: 'Left and right go by days, up and down by hours, Page Up and Page Down by four weeks, Enter lists the day',
  },
  { part: 'Folds under the cloth', keys: 'Enter opens and closes' },
];
