/** A file whose place lies this near to a station of the same number or name was recorded there. */
export const STATION_WITHIN = { deg: 0.02, heightM: 50 } as const;
