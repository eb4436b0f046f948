import { lazy, Suspense } from 'react';
import { classWords } from '../../charts/hour-class-words.ts';
import { hourClasses } from '../../engine/hour-classes/hour-class.ts';
import { type LayerKind, layerKinds, layerNames, type MapLayer, usualLayer } from './map-layer.ts';

const DepressionOptions = lazy(async () => ({
  default: (await import('./depression-options.tsx')).DepressionOptions,
}));

interface LayerChoiceProps {
  readonly layer: MapLayer;
  readonly onChoose: (layer: MapLayer) => void;
}

const SELECT =
  'min-h-8 w-full min-w-0 rounded-md border border-[#b9af9b] bg-paper px-1.5 pointer-coarse:min-h-10 text-body';

/** What the marks are coloured by, with the options of the layer under it. */
export function LayerChoice({ layer, onChoose }: LayerChoiceProps) {
  return (
    <div className="grid gap-1.5">
      <select
        aria-label="Layer of the map"
        value={layer.kind}
        onChange={({ currentTarget }) => {
          const kind = layerKinds.find((each: LayerKind) => each === currentTarget.value);
          if (kind !== undefined) onChoose(usualLayer(kind));
        }}
        className={`${SELECT} serif text-lead`}
      >
        {layerKinds.map((kind) => (
          <option key={kind} value={kind}>
            {layerNames[kind]}
          </option>
        ))}
      </select>
      {layer.kind === 'hours' ? (
        <select
          aria-label="Hour class"
          value={layer.hourClass}
          onChange={({ currentTarget }) => {
            const hourClass = hourClasses.find((each) => each === currentTarget.value);
            if (hourClass !== undefined) onChoose({ kind: 'hours', hourClass });
          }}
          className={SELECT}
        >
          {hourClasses.map((hourClass) => (
            <option key={hourClass} value={hourClass}>
              {classWords[hourClass]}
            </option>
          ))}
        </select>
      ) : null}
      {layer.kind === 'depression' ? (
        <Suspense fallback={<div className="min-h-20" />}>
          <DepressionOptions layer={layer} onChoose={onChoose} />
        </Suspense>
      ) : null}
    </div>
  );
}
