import type { SiteRecord } from '../../contract/site-record.ts';

const WIDTH = 300;
const HEIGHT = 220;
const MARGIN = 34;
const KM_PER_DEGREE = 111.195;
const INK = '#22302f';
const SOFT = '#55625e';

interface StationDrawingProps {
  readonly record: SiteRecord;
  /** The station that is marked; null for none. */
  readonly markedId: string | null;
  readonly shown: SiteRecord['candidates'];
}

/** The site with lines to its nearest stations, at scale and with north up; the table beside it says the same in figures. */
export function StationDrawing({ record: { site }, markedId, shown }: StationDrawingProps) {
  const east = (longitude: number): number => {
    const turned = ((((longitude - site.longitude) % 360) + 540) % 360) - 180;
    return turned * KM_PER_DEGREE * Math.cos((site.latitude * Math.PI) / 180);
  };
  const points = shown.map((each) => ({
    ...each,
    eastKm: east(each.longitude),
    northKm: (each.latitude - site.latitude) * KM_PER_DEGREE,
  }));
  const reach = (kmOf: (point: (typeof points)[number]) => number) =>
    Math.max(1e-3, ...points.map((each) => Math.abs(kmOf(each))));
  const scale = Math.min(
    (WIDTH / 2 - MARGIN) / reach(({ eastKm }) => eastKm),
    (HEIGHT / 2 - MARGIN) / reach(({ northKm }) => northKm),
  );
  const barKm = niceKm((WIDTH * 0.3) / scale);
  const at = ({ eastKm, northKm }: { eastKm: number; northKm: number }) => ({
    x: WIDTH / 2 + eastKm * scale,
    y: HEIGHT / 2 - northKm * scale,
  });
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      aria-hidden="true"
      className="w-full max-w-[24rem] border border-line bg-paper"
    >
      {points.map((point) => {
        const { x, y } = at(point);
        const isMarked = point.id === markedId;
        return (
          <g key={point.id}>
            <line
              x1={WIDTH / 2}
              y1={HEIGHT / 2}
              x2={x}
              y2={y}
              stroke={isMarked ? INK : '#b9af9b'}
              strokeWidth={isMarked ? 1.5 : 1}
              {...(isMarked ? {} : { strokeDasharray: '3 3' })}
            />
            <path d={`M${x} ${y - 5}l5 9h-10z`} fill={isMarked ? INK : '#fbf9f3'} stroke={INK} strokeWidth="1.2" />
            <text
              x={Math.min(WIDTH - 6, Math.max(6, x))}
              // Names stand on the side away from the site, so that they keep clear of its mark.
              y={y <= HEIGHT / 2 ? y - 9 : y + 16}
              textAnchor={x < WIDTH * 0.3 ? 'start' : x > WIDTH * 0.7 ? 'end' : 'middle'}
              fontSize="10.5"
              fill={isMarked ? INK : SOFT}
            >
              {point.name.length > 18 ? `${point.name.slice(0, 17)}…` : point.name}
            </text>
          </g>
        );
      })}
      <rect x={WIDTH / 2 - 8} y={HEIGHT / 2 - 8} width="16" height="16" fill="#fbf9f3" stroke={INK} strokeWidth="1.5" />
      <text x={WIDTH / 2} y={HEIGHT / 2 + 3.5} textAnchor="middle" fontSize="10.5" fontWeight="600" fill={INK}>
        {site.letters}
      </text>
      <path d={`M10 ${HEIGHT - 10}h${barKm * scale}`} stroke={INK} strokeWidth="2" />
      <text x="10" y={HEIGHT - 16} fontSize="10" fill={SOFT}>
        {barKm} km
      </text>
    </svg>
  );
}

/** 1, 2 or 5 times a power of ten, at most `km`. */
function niceKm(km: number): number {
  const power = 10 ** Math.floor(Math.log10(km));
  const step = [5, 2, 1].find((each) => each * power <= km) ?? 1;
  return step * power;
}
