import type { CompositionOnWire } from '../../contract/composition';
import { polygonFit, polygonPicture } from '../../view/composition-polygon';
import { polygonSentence, polygonWords } from '../../view/composition-why';
import type { CauseContext } from '../../view/composition-rows';
import type { PhaseName } from '../../view/phase';
import { PolygonDrawing } from './PolygonDrawing';

interface Props {
  readonly before: CompositionOnWire;
  readonly after: CompositionOnWire;
  readonly phase: PhaseName;
  readonly context: CauseContext;
}

const BOX = { width: 320, height: 218 } as const;

/** Two compositions side by side at one scale; a sentence in place of one that can't be told. */
export function PolygonPair({ before, after, phase, context }: Props) {
  const polygons = [before, after].flatMap((side) =>
    side.kind === 'separated' && side.polygon !== null ? [side.polygon] : [],
  );
  const fit = polygonFit(polygons, BOX);
  const sides = [
    { name: 'before', composition: before },
    { name: 'after', composition: after },
  ];
  return (
    <div className="mt-3 grid gap-x-8 gap-y-4 sm:grid-cols-2">
      {sides.map(({ name, composition }) => (
        <figure key={name} className="m-0 min-w-0">
          <figcaption className="text-ink-2">{name}</figcaption>
          {composition.kind === 'separated' && composition.polygon !== null ? (
            <div className="mx-auto max-w-[26rem]">
              <PolygonDrawing
                picture={polygonPicture(composition.polygon, {
                  fit,
                  box: BOX,
                  words: polygonWords(composition, context),
                })}
                box={BOX}
                phase={phase}
                label={`${name}: ${polygonSentence(composition, context)}`}
                ink="text-ink"
                marked={undefined}
              />
            </div>
          ) : (
            <NotTold composition={composition} />
          )}
        </figure>
      ))}
    </div>
  );
}

function NotTold({ composition }: { composition: CompositionOnWire }) {
  if (composition.kind === 'separated') return <p>There was no current to draw the causes against.</p>;
  return (
    <p className="mt-1 max-w-[50ch]">
      <strong className="font-semibold">Not separable.</strong> {composition.reason}
    </p>
  );
}
