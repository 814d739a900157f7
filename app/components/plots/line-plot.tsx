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

const WIDTH = 440;
const HEIGHT = 300;
const EDGE = { left: 56, right: 14, top: 16, bottom: 46 };

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
        className="w-full max-w-2xl rounded-xl border border-line bg-surface"
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
        {y.ticks(5).map((tick) => (
          <g key={tick}>
            <line x1={EDGE.left} x2={WIDTH - EDGE.right} y1={y(tick)} y2={y(tick)} className="stroke-line" />
            <text
              x={EDGE.left - 8}
              y={y(tick) + 5}
              textAnchor="end"
              className="figures fill-muted text-[12px]"
            >
              {tick.toLocaleString('en-GB')}
            </text>
          </g>
        ))}
        {x.ticks(6).map((tick) => (
          <text
            key={tick}
            x={x(tick)}
            y={HEIGHT - EDGE.bottom + 20}
            textAnchor="middle"
            className="figures fill-muted text-[12px]"
          >
            {tick.toLocaleString('en-GB')}
          </text>
        ))}
        <text
          x={(EDGE.left + WIDTH) / 2}
          y={HEIGHT - 10}
          textAnchor="middle"
          className="fill-ink text-[13px]"
        >
          {xLabel}
        </text>
        <text
          transform={`translate(16 ${HEIGHT / 2}) rotate(-90)`}
          textAnchor="middle"
          className="fill-ink text-[13px]"
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
          <MarkedPoint key={mark.name} name={mark.name} x={x(mark.x)} y={y(mark.y)} />
        ))}
      </svg>
      <figcaption className="mt-1 text-sm text-muted">{description}</figcaption>
    </figure>
  );
}

/** A ring with its name beside it, on the side where there is room. */
function MarkedPoint({ name, x, y }: Mark) {
  const left = x > WIDTH * 0.7;
  return (
    <g>
      <circle cx={x} cy={y} r="6" className="fill-paper stroke-ink" strokeWidth="2.5" />
      <text
        x={left ? x - 11 : x + 11}
        y={y < EDGE.top + 20 ? y + 18 : y - 8}
        textAnchor={left ? 'end' : 'start'}
        className="fill-ink text-[13px] font-semibold"
      >
        {name}
      </text>
    </g>
  );
}
