import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { useId } from 'react';

export type Point = { x: number; y: number };
export type Curve = { name: string; points: readonly Point[]; look: 'main' | 'second' | 'dots' };
export type Band = { name: string; fromY: number; toY: number };
export type Mark = { name: string; x: number; y: number };

type Props = {
  title: string;
  /** What the plot shows, in words, for those who do not see it. */
  description: string;
  xLabel: string;
  yLabel: string;
  curves: readonly Curve[];
  bands?: readonly Band[];
  boxes?: readonly { name: string; x: readonly [number, number]; y: readonly [number, number] }[];
  marks?: readonly Mark[];
};

const WIDTH = 640;
const HEIGHT = 380;
const EDGE = { left: 64, right: 16, top: 16, bottom: 52 };

const STROKES = { main: 'stroke-action', second: 'stroke-edge', dots: '' } as const;

/** A plot of a few curves, drawn on the server as SVG, readable in print and without scripts. */
export function LinePlot({
  title,
  description,
  xLabel,
  yLabel,
  curves,
  bands = [],
  boxes = [],
  marks = [],
}: Props) {
  const id = useId();
  const points = [
    ...curves.flatMap((curve) => curve.points),
    ...marks,
    ...bands.flatMap(({ fromY, toY }) => [fromY, toY].map((y) => ({ x: curves[0]?.points[0]?.x ?? 0, y }))),
    ...boxes.flatMap(({ x, y }) => [0, 1].map((end) => ({ x: x[end] ?? 0, y: y[end] ?? 0 }))),
  ];
  const xs = points.map(({ x }) => x);
  const ys = points.map(({ y }) => y);
  const x = scaleLinear([Math.min(...xs), Math.max(...xs)], [EDGE.left, WIDTH - EDGE.right]).nice();
  const y = scaleLinear([Math.min(0, ...ys), Math.max(...ys) || 1], [HEIGHT - EDGE.bottom, EDGE.top]).nice();
  const path = line<Point>(
    (point) => x(point.x),
    (point) => y(point.y),
  );
  return (
    <figure>
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        className="w-full max-w-3xl rounded-xl border border-line bg-surface"
        role="img"
        aria-labelledby={`${id}-title ${id}-text`}
      >
        <title id={`${id}-title`}>{title}</title>
        <desc id={`${id}-text`}>{description}</desc>
        {bands.map((band) => (
          <rect
            key={band.name}
            x={EDGE.left}
            width={WIDTH - EDGE.left - EDGE.right}
            y={Math.min(y(band.fromY), y(band.toY))}
            height={Math.abs(y(band.toY) - y(band.fromY))}
            className="fill-action-soft"
          />
        ))}
        {boxes.map((box) => (
          <rect
            key={box.name}
            x={x(box.x[0])}
            width={x(box.x[1]) - x(box.x[0])}
            y={y(box.y[1])}
            height={y(box.y[0]) - y(box.y[1])}
            className="fill-action-soft stroke-action"
            strokeDasharray="5 4"
          />
        ))}
        {y.ticks(6).map((tick) => (
          <g key={tick}>
            <line x1={EDGE.left} x2={WIDTH - EDGE.right} y1={y(tick)} y2={y(tick)} className="stroke-line" />
            <text
              x={EDGE.left - 8}
              y={y(tick) + 5}
              textAnchor="end"
              className="figures fill-muted text-[13px]"
            >
              {tick.toLocaleString('en-GB')}
            </text>
          </g>
        ))}
        {x.ticks(8).map((tick) => (
          <text
            key={tick}
            x={x(tick)}
            y={HEIGHT - EDGE.bottom + 20}
            textAnchor="middle"
            className="figures fill-muted text-[13px]"
          >
            {tick.toLocaleString('en-GB')}
          </text>
        ))}
        <text
          x={(EDGE.left + WIDTH) / 2}
          y={HEIGHT - 10}
          textAnchor="middle"
          className="fill-ink text-[14px]"
        >
          {xLabel}
        </text>
        <text
          transform={`translate(16 ${HEIGHT / 2}) rotate(-90)`}
          textAnchor="middle"
          className="fill-ink text-[14px]"
        >
          {yLabel}
        </text>
        {curves.map((curve) =>
          curve.look === 'dots' ? (
            <g key={curve.name} className="fill-ink">
              {curve.points.map((point) => (
                <circle key={`${point.x}`} cx={x(point.x)} cy={y(point.y)} r="3.5" />
              ))}
            </g>
          ) : (
            <path
              key={curve.name}
              d={path([...curve.points]) ?? ''}
              fill="none"
              strokeWidth="2.5"
              strokeDasharray={curve.look === 'second' ? '6 5' : undefined}
              className={STROKES[curve.look]}
            />
          ),
        )}
        {marks.map((mark) => (
          <g key={mark.name}>
            <circle cx={x(mark.x)} cy={y(mark.y)} r="7" className="fill-paper stroke-ink" strokeWidth="3" />
            <text x={x(mark.x) + 12} y={y(mark.y) - 8} className="fill-ink text-[14px] font-semibold">
              {mark.name}
            </text>
          </g>
        ))}
      </svg>
      <figcaption className="mt-1 text-sm text-muted">{description}</figcaption>
    </figure>
  );
}
