import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { LedgerBar } from '../../../src/charts/ledger-bar.tsx';
import { hourClasses } from '../../../src/engine/hour-classes/hour-class.ts';

const none = { closed: 0, missing: 0, idle: 0, frozen: 0, damp: 0, air: 0 };
const noStage = { direct: 0, indirect: 0, dewpoint: 0, twostage: 0, short: 0, beyond: 0 };

function widthsOf(markup: string): number[] {
  return [...markup.matchAll(/<rect x="[^"]*" width="([\d.]+)%" height="18" fill="url/g)].map((match) =>
    Number(match[1]),
  );
}

describe('LedgerBar', () => {
  it('gives each class of hours with demand its share, and fills the bar', () => {
    const classes = { ...none, ...noStage, air: 50, direct: 30, short: 15, damp: 5, idle: 900, closed: 7760 };
    const markup = renderToStaticMarkup(<LedgerBar id="bar" classes={classes} demand={100} label="Ledger." />);
    expect(widthsOf(markup)).toEqual([50, 30, 15, 5]);
  });

  it('shows every class of an hour with demand, and none without', () => {
    const classes = {
      closed: 1,
      missing: 1,
      idle: 1,
      frozen: 1,
      damp: 1,
      air: 1,
      direct: 1,
      indirect: 1,
      dewpoint: 1,
      twostage: 1,
      short: 1,
      beyond: 1,
    };
    const markup = renderToStaticMarkup(<LedgerBar id="bar" classes={classes} demand={9} label="Ledger." />);
    expect(widthsOf(markup)).toHaveLength(hourClasses.length - 3);
    expect(widthsOf(markup).reduce((sum, width) => sum + width, 0)).toBeCloseTo(100, 9);
  });

  it('is an empty frame with its sentence when there is no demand', () => {
    const classes = { ...none, ...noStage, closed: 8760 };
    const markup = renderToStaticMarkup(
      <LedgerBar id="bar" classes={classes} demand={0} label="No hour with demand." />,
    );
    expect(widthsOf(markup)).toEqual([]);
    expect(markup).toContain('aria-label="No hour with demand."');
  });
});
