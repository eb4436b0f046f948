/** An invented site of the demo's programme. */
export interface DemoSite {
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  /** As somebody surveyed it; null takes the height of the relief. */
  readonly elevationM: number | null;
  readonly designLoadKw: number | null;
  readonly notes: string;
}

/** Twelve schools that are nowhere. Most lie near a station of the demo, some so far or so high that the station asks for a look. */
export const demoSites: readonly DemoSite[] = [
  site('Kite Hollow Primary', [-24.31, 24.72], { elevationM: 1085, designLoadKw: 180 }),
  site('Sandgrouse High', [-27.85, 24.36], { designLoadKw: 320 }),
  site('Ashveld Technical School', [-29.13, 25.31], { elevationM: 1345, designLoadKw: 450 }),
  site('Twin Kopjes Combined', [-27.44, 26.8], { designLoadKw: 260 }),
  site('Harrow Ridge School', [-26.31, 28.2], { designLoadKw: 390, notes: 'Two halls, one of them without shade.' }),
  site('Vineward Boarding School', [-33.76, 18.93], { designLoadKw: 210 }),
  site('Lantern Bay Primary', [-32.79, 18.3], { designLoadKw: 90 }),
  site('Cane Coast Academy', [-29.62, 31.02], { designLoadKw: 300, notes: 'Humid from December to March.' }),
  site('Baobab Gate Secondary', [-24.47, 30.49], { designLoadKw: 240 }),
  site('Leadwood Village School', [-22.71, 30.98], {}),
  // Too far from every station of the demo.
  site('Whitepan Farm School', [-20.1, 17.4], { designLoadKw: 60 }),
  // Above its only near station.
  site('Cloudgate Mission', [-29.45, 29.45], { elevationM: 2050, designLoadKw: 75 }),
];

function site(
  name: string,
  [latitude, longitude]: readonly [latitude: number, longitude: number],
  more: Partial<Pick<DemoSite, 'elevationM' | 'designLoadKw' | 'notes'>>,
): DemoSite {
  const { elevationM = null, designLoadKw = null, notes = '' } = more;
  return { name, latitude, longitude, elevationM, designLoadKw, notes: `${notes} Invented place.`.trim() };
}
