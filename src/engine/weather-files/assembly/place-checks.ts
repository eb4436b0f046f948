import type { FindingList } from '../finding-list.ts';
import { isOff, type QualityOptions } from '../quality/quality-options.ts';
import type { DeclaredStation } from '../weather-file-reading.ts';

const DEGREES_PER_HOUR = 15;
/** Zone less longitude / 15, h: outside these in 3 of 1751 surveyed files. */
const USUAL_ZONE_H = { low: -0.9, high: 1.6 } as const;
const FLIP_FROM_H = 3;

/** Latitude and longitude exist, and the zone fits the longitude; what does not is asked or told, never refused. */
export function checkPlace(
  place: { station: DeclaredStation; line: number | null; options: QualityOptions },
  findings: FindingList,
): void {
  const { line, options, station } = place;
  const { latitude, longitude, utcOffsetH } = station;
  if (latitude === null || longitude === null || utcOffsetH === null) {
    const missing = [
      latitude === null ? 'latitude' : '',
      longitude === null ? 'longitude' : '',
      utcOffsetH === null ? 'time zone' : '',
    ].filter((word) => word !== '');
    findings.ask('place-missing', {
      line,
      message: () =>
        `The file gives no usable ${missing.join(' or ')}. Say where the station is and its offset from UTC.`,
      proposal: null,
    });
    return;
  }
  if (latitude === 0 && longitude === 0) {
    findings.ask('place-missing', {
      line,
      message: () =>
        'The file gives 0, 0 as its place, in the sea off Africa, which stands for no place. Say where the station is.',
      proposal: null,
    });
    return;
  }
  if (Math.abs(latitude) > 90 || Math.abs(longitude) > 180) askAboutSign(station, line, findings);
  else if (!isOff('place-zone', options)) checkZone({ latitude, longitude, utcOffsetH }, line, findings);
}

function askAboutSign(station: DeclaredStation, line: number | null, findings: FindingList): void {
  const latitude = station.latitude ?? 0;
  const longitude = station.longitude ?? 0;
  const swapped = Math.abs(longitude) <= 90 && Math.abs(latitude) <= 180;
  const around = Math.abs(latitude) <= 90 && longitude > 180 && longitude <= 360;
  findings.ask('place-sign', {
    asAlways: true,
    line,
    message: () => `Latitude ${latitude}, longitude ${longitude} is not a place on Earth. Say where the station is.`,
    proposal: swapped
      ? `The two are exchanged: latitude ${longitude}, longitude ${latitude}.`
      : around
        ? `The longitude is counted eastwards round the Earth: ${Math.round((longitude - 360) * 1e6) / 1e6}.`
        : null,
  });
}

function checkZone(
  place: { latitude: number; longitude: number; utcOffsetH: number },
  line: number | null,
  findings: FindingList,
): void {
  const { longitude, utcOffsetH } = place;
  const aheadH = utcOffsetH - longitude / DEGREES_PER_HOUR;
  if (aheadH >= USUAL_ZONE_H.low && aheadH <= USUAL_ZONE_H.high) return;
  const sentence = `The time zone, UTC${signed(utcOffsetH)}, is ${Math.abs(aheadH).toFixed(1)} h ${aheadH > 0 ? 'ahead of' : 'behind'} what longitude ${longitude} makes likely`;
  const flippedH = utcOffsetH + longitude / DEGREES_PER_HOUR;
  if (Math.abs(aheadH) > FLIP_FROM_H && Math.abs(flippedH) <= USUAL_ZONE_H.high) {
    findings.ask('place-sign', {
      line,
      message: () => `${sentence}; with the other sign of the longitude it fits. Say which is right.`,
      proposal: `The longitude is ${-longitude}.`,
    });
    return;
  }
  findings.add({
    code: 'place-zone',
    severity: 'doubt',
    line,
    message: () => `${sentence}. Place or zone is wrong: confirm the place before it is drawn.`,
  });
}

function signed(hours: number): string {
  return hours < 0 ? `${hours}` : `+${hours}`;
}
