export interface RankSharesRow {
  readonly name: string;
  /** Share of the draws, 0..1, at rank 1, 2, ... */
  readonly shares: readonly number[];
}

export interface RankSharesProps {
  readonly rows: readonly RankSharesRow[];
  /** The same as the picture, in a sentence. */
  readonly label: string;
}

const INK = '#22302f';
const SOFT = '#55625e';
const RULE = '#d5ccb9';
const CELL = { width: 64, height: 26, gap: 2 } as const;
const NAMES_WIDTH = 150;
const HEAD_HEIGHT = 22;
const MOST_LETTERS = 22;

/** Places down, ranks across: the larger the square, the more of the draws put the place at that rank. */
export function RankShares({ rows, label }: RankSharesProps) {
  const ranks = Math.max(0, ...rows.map(({ shares }) => shares.length));
  const width = NAMES_WIDTH + ranks * CELL.width;
  const height = HEAD_HEIGHT + rows.length * CELL.height;
  return (
    <svg
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={label}
      style={{ display: 'block', width: '100%', maxWidth: width }}
    >
      <g fontSize="11" fill={SOFT}>
        {Array.from({ length: ranks }, (_none, rank) => rank + 1).map((rank) => (
          <text key={rank} x={middleOf(rank - 1)} y={14} textAnchor="middle">
            rank {rank}
          </text>
        ))}
      </g>
      {rows.map(({ name, shares }, row) => (
        <g key={name}>
          <line
            x1={0}
            x2={width}
            y1={HEAD_HEIGHT + row * CELL.height}
            y2={HEAD_HEIGHT + row * CELL.height}
            stroke={RULE}
          />
          <text x={0} y={HEAD_HEIGHT + (row + 0.65) * CELL.height} fontSize="12" fill={INK}>
            {name.length > MOST_LETTERS ? `${name.slice(0, MOST_LETTERS - 1)}…` : name}
          </text>
          {shares.map((share, rank) => {
            const side = Math.sqrt(share) * (CELL.height - CELL.gap * 2);
            const middleY = HEAD_HEIGHT + (row + 0.5) * CELL.height;
            return (
              <rect
                // biome-ignore lint/suspicious/noArrayIndexKey: a rank is its place in the row
                key={rank}
                x={middleOf(rank) - side / 2}
                y={middleY - side / 2}
                width={side}
                height={side}
                fill={INK}
              />
            );
          })}
        </g>
      ))}
    </svg>
  );
}

function middleOf(rank: number): number {
  return NAMES_WIDTH + (rank + 0.5) * CELL.width;
}
