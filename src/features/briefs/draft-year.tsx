import { useMemo } from 'react';
import { classWords, dampWords } from '../../charts/hour-class-words.ts';
import type { BriefPreview } from '../../contract/briefs.ts';
import { number } from '../../lib/format.ts';
import { YearClothCanvas } from '../../ui/year-cloth-canvas.tsx';

const CLOTH_PX = 120;

/** The example year hour by hour under the draft. */
export function DraftYear({ preview }: { preview: BriefPreview }) {
  const { hourClasses, ledger, station } = preview;
  const codes = useMemo(() => Uint8Array.from(atob(hourClasses), (byte) => byte.charCodeAt(0)), [hourClasses]);
  return (
    <section aria-labelledby="draft-year" className="min-w-0">
      <h2 id="draft-year" className="mb-1 text-name">
        The year at {station.name} under the draft
      </h2>
      <YearClothCanvas
        codes={codes}
        heightPx={CLOTH_PX}
        label={`The year at ${station.name} hour by hour: ${number(ledger.met)} of ${number(ledger.demand)} hours with demand are met.`}
        words={(hourClass) => (hourClass === 'damp' ? dampWords(ledger) : classWords[hourClass])}
      />
    </section>
  );
}
