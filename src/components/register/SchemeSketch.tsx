import { useId } from 'react';
import type { Characteristic } from '../../protection/characteristic';
import { schemeDrawing, type Point, type SchemeDrawing } from '../../view/register-drawing';

interface SchemeSketchProps {
  /** one, or an earlier and a later one to be laid over each other */
  characteristics: readonly Characteristic[];
  /** said instead where there is nothing to draw */
  nothing: string;
}

const BOX = { width: 340, height: 210, left: 6, bottom: 20 };
/** below the pickup a label needs this much before the axis */
const LABEL_ROOM = 18;
const LAST = { stroke: 'var(--ink)', strokeWidth: 2 };
const EARLIER = { stroke: 'var(--accent)', strokeWidth: 1.5, strokeDasharray: '6 4' };
const GUIDE = { stroke: 'var(--ink-2)', strokeWidth: 0.75, strokeDasharray: '2 3' };
const strokeOf = (index: number, count: number) => (index === count - 1 ? LAST : EARLIER);

/** A characteristic in the plane of its kind: the threshold over restraint, or the region in which it restrains. */
export function SchemeSketch({ characteristics, nothing }: SchemeSketchProps) {
  const drawing = schemeDrawing(characteristics, BOX);
  if (drawing === undefined)
    return (
      <p className="flex aspect-[34/21] w-full max-w-[22rem] items-center justify-center border border-dashed border-rule px-6 text-center text-ink-2">
        {nothing}
      </p>
    );
  return drawing.kind === 'threshold' ? <Threshold drawing={drawing} /> : <Region drawing={drawing} />;
}

function Frame({ label, children }: { label: string; children: (hatch: string) => React.ReactNode }) {
  const hatchId = useId();
  return (
    <svg
      viewBox={`0 0 ${BOX.width} ${BOX.height}`}
      className="w-full max-w-[22rem]"
      role="img"
      aria-label={label}
    >
      <defs>
        <pattern
          id={hatchId}
          width="6"
          height="6"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <line x1="0" y1="0" x2="0" y2="6" stroke="var(--rule)" strokeWidth="0.6" />
        </pattern>
      </defs>
      {children(`url(#${hatchId})`)}
    </svg>
  );
}

const pointsText = (points: readonly Point[]): string =>
  points.map(([x, y]) => `${x.toFixed(1)},${y.toFixed(1)}`).join(' ');

function Label({
  x,
  y,
  children,
  anchor,
}: {
  x: number;
  y: number;
  children: string;
  anchor?: 'middle' | 'end';
}) {
  return (
    <text
      {...{ x, y, fontSize: 11, fill: 'var(--ink-2)', stroke: 'var(--panel)', strokeWidth: 3 }}
      paintOrder="stroke"
      textAnchor={anchor ?? 'start'}
    >
      {children}
    </text>
  );
}

function Threshold({ drawing }: { drawing: Extract<SchemeDrawing, { kind: 'threshold' }> }) {
  const { curves, restraintLabel } = drawing;
  const last = curves[curves.length - 1]!;
  const floor = BOX.height - BOX.bottom;
  const words = curves.map(
    ({ pickupLabel, kneeX, kneeLabel }) =>
      `pickup ${pickupLabel}${kneeX === undefined ? '' : `, knee at ${kneeLabel}`}`,
  );
  return (
    <Frame label={`Threshold against restraint: ${words.join('; then ')}.`}>
      {(hatch) => (
        <>
          <polygon
            points={`${pointsText(last.points)} ${BOX.width},0 ${BOX.left},0`}
            fill={hatch}
            opacity="0.7"
          />
          <path d={`M${BOX.left} 0V${floor}H${BOX.width}`} fill="none" stroke="var(--rule)" />
          <path d={`M${BOX.left} ${last.pickupY.toFixed(1)}H${BOX.width}`} {...GUIDE} />
          {last.kneeX !== undefined && <path d={`M${last.kneeX.toFixed(1)} 0V${floor}`} {...GUIDE} />}
          {curves.map(({ points }, index) => (
            <polyline
              key={index}
              points={pointsText(points)}
              fill="none"
              strokeLinejoin="round"
              {...strokeOf(index, curves.length)}
            />
          ))}
          <Label
            x={BOX.width - 2}
            y={last.pickupY + (last.pickupY > floor - LABEL_ROOM ? -5 : 13)}
            anchor="end"
          >{`pickup ${last.pickupLabel}`}</Label>
          <Label x={BOX.left} y={BOX.height - 5}>
            0
          </Label>
          {last.kneeX !== undefined && (
            <Label x={last.kneeX} y={BOX.height - 5} anchor="middle">{`knee ${last.kneeLabel}`}</Label>
          )}
          <Label x={BOX.width - 2} y={BOX.height - 5} anchor="end">
            {restraintLabel}
          </Label>
          <Label x={BOX.left + 10} y={16}>
            operates
          </Label>
        </>
      )}
    </Frame>
  );
}

function Region({ drawing }: { drawing: Exclude<SchemeDrawing, { kind: 'threshold' }> }) {
  const { centre, unit, regions } = drawing;
  const [x, y] = centre;
  const isAlpha = drawing.kind === 'alpha-plane';
  const last = regions[regions.length - 1]!;
  const what = isAlpha ? 'Ratio of the two ends’ currents' : 'Angle between the two ends’ currents';
  return (
    <Frame label={`${what}. Restrains ${regions.map(({ label }) => label).join('; then ')}.`}>
      {(hatch) => (
        <>
          {isAlpha ? (
            <rect width={BOX.width} height={BOX.height} fill={hatch} opacity="0.7" />
          ) : (
            <circle cx={x} cy={y} r={unit} fill={hatch} stroke="var(--rule)" />
          )}
          {regions.map(({ points }, index) => (
            <polygon
              key={index}
              points={pointsText(points)}
              fill={index === regions.length - 1 ? 'var(--panel)' : 'none'}
              fillRule="evenodd"
              strokeLinejoin="round"
              {...strokeOf(index, regions.length)}
            />
          ))}
          {regions.length > 1 && (
            <polygon
              points={pointsText(regions[0]!.points)}
              fill="none"
              strokeLinejoin="round"
              {...EARLIER}
            />
          )}
          <path d={`M0 ${y}H${BOX.width}M${x} 0V${BOX.height}`} stroke="var(--rule)" strokeWidth="0.75" />
          {isAlpha && <circle cx={x - unit} cy={y} r="3" fill="var(--ink)" />}
          {isAlpha && (
            <Label x={x - unit} y={y - 7} anchor="middle">
              −1
            </Label>
          )}
          {isAlpha ? <AlphaLabels y={y} /> : <SectorLabels x={x} y={y} unit={unit} />}
          <Label x={last.mark.at[0] - 5} y={isAlpha ? y - 5 : y + 14} anchor="end">
            {last.mark.text}
          </Label>
        </>
      )}
    </Frame>
  );
}

function AlphaLabels({ y }: { y: number }) {
  return (
    <>
      <Label x={6} y={16}>
        operates
      </Label>
      <Label x={BOX.width - 4} y={y - 5} anchor="end">
        real
      </Label>
    </>
  );
}

function SectorLabels({ x, y, unit }: { x: number; y: number; unit: number }) {
  return (
    <>
      <Label x={x + unit / 2} y={y - 8} anchor="middle">
        operates
      </Label>
      <Label x={x - unit / 2} y={y - 8} anchor="middle">
        restrains
      </Label>
      <Label x={x - unit - 5} y={y - 5} anchor="end">
        180°
      </Label>
      <Label x={x + unit + 5} y={y - 5}>
        0°
      </Label>
    </>
  );
}
