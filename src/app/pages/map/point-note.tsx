import type { BriefBasis } from '../../../contract/runs.ts';
import { EstimatePanel } from '../../../features/runs/estimate-panel.tsx';
import type { ProgrammeIds } from '../../../features/runs/run-queries.ts';
import { position } from '../../../lib/format.ts';
import type { PlaceRef, Position } from '../../../map/sheet-place.ts';
import { Button } from '../../../ui/button.tsx';

interface PointNoteProps {
  readonly ids: ProgrammeIds;
  readonly brief: BriefBasis;
  readonly point: Position;
  /** The map shows a draft; the estimate is of the brief as it was saved. */
  readonly isDraft: boolean;
  readonly onChoose: (place: PlaceRef | null) => void;
}

/** A position between the places: an estimate with its basis. */
export function PointNote({ ids, brief, point, isDraft, onChoose }: PointNoteProps) {
  return (
    <section aria-label="Clicked point" className="grid content-start gap-3">
      <h2 className="text-title">{position(point)}</h2>
      {isDraft ? <p className="text-soft">Under the saved version {brief.version}, not under the draft.</p> : null}
      <EstimatePanel
        ids={ids}
        point={point}
        briefVersionId={brief.briefVersionId}
        onStation={(id) => onChoose({ kind: 'station', id })}
      />
      <p>
        <Button onClick={() => onChoose(null)}>Close</Button>
      </p>
    </section>
  );
}
