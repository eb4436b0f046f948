import { type FindingList, whole } from '../finding-list.ts';
import { AT_SEA_FROM_KM, FARTHEST_TOLD_KM } from '../relief.ts';
import type { DeclaredStation } from '../weather-file-reading.ts';
import { isOff, type QualityOptions } from './quality-options.ts';

const HEIGHT_WITHIN_M = 300;

/**
 * Holds a place against coast and relief: over 20 km out at sea is a doubt; an elevation more than 300 m from that of the relief is a
 * note, since the relief is approximate. Both ask nothing.
 */
export function checkGround(
  place: { station: DeclaredStation; line: number | null; options: QualityOptions },
  findings: FindingList,
): void {
  const { line, options, station } = place;
  const { elevationM, latitude, longitude } = station;
  const { relief } = options;
  if (relief === undefined || latitude === null || longitude === null) return;
  const exists = Math.abs(latitude) <= 90 && Math.abs(longitude) <= 180 && (latitude !== 0 || longitude !== 0);
  if (!exists) return;
  const seaKm = relief.kmFromLand(latitude, longitude);
  if (seaKm > AT_SEA_FROM_KM) {
    if (!isOff('place-sea', options)) tellSea({ latitude, longitude, line, seaKm }, findings);
    return;
  }
  if (elevationM === null || isOff('elevation-relief', options)) return;
  const groundM = relief.heightM(latitude, longitude);
  if (Math.abs(elevationM - groundM) <= HEIGHT_WITHIN_M) return;
  findings.add({
    code: 'elevation-relief',
    severity: 'note',
    line,
    done: 'kept',
    message: () =>
      `The file gives an elevation of ${whole(elevationM)} m; the relief, a point every 9 km, has ${whole(groundM)} m there. Between mountains that is usual; otherwise elevation or place is wrong. The elevation of the file is used.`,
  });
}

function tellSea(
  place: { latitude: number; longitude: number; line: number | null; seaKm: number },
  findings: FindingList,
): void {
  const { latitude, line, longitude, seaKm } = place;
  const away = seaKm >= FARTHEST_TOLD_KM ? `over ${FARTHEST_TOLD_KM} km` : `${whole(seaKm)} km`;
  findings.add({
    code: 'place-sea',
    severity: 'doubt',
    line,
    done: 'kept',
    message: () =>
      `Latitude ${latitude}, longitude ${longitude} lies in the sea, ${away} from the nearest land. Confirm or correct the place before it is drawn.`,
  });
}
