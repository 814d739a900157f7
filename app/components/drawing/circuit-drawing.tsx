import { Link } from 'react-router';
import {
  DRAWING,
  PIPES,
  REFRIGERANT_SPOTS,
  type Spot,
  TARGET,
} from '#app/domain/drawing/refrigerant-circuit.ts';

type Props = {
  names: Readonly<Record<string, string>>;
  /** Parts with a confirmed or suspected finding. */
  found?: readonly string[];
  /** How many cases each part had; drawn as dots sized by cases. */
  counts?: Readonly<Record<string, number>>;
  selected?: string;
  /** Where tapping a part leads; without it the drawing only shows. */
  linkFor?: (componentId: string) => string;
};

const ROUND = new Set(['compressor-body', 'compressor-shaft-seal']);

/**
 * The schematic of a refrigerant circuit. Each part is a link, so that a finding can be placed by finger, by keyboard
 * and without scripts; the numbers are explained in the list beside it.
 */
export function CircuitDrawing({ names, found = [], counts = {}, selected, linkFor }: Props) {
  return (
    <figure className="grid items-start gap-5 md:grid-cols-[22rem_1fr]">
      <svg
        viewBox={`0 0 ${DRAWING.width} ${DRAWING.height}`}
        className="mx-auto w-full max-w-[26rem] rounded-xl border border-line bg-surface"
        role={linkFor ? 'group' : 'img'}
        aria-label="Refrigerant circuit, schematic"
      >
        <title>Refrigerant circuit, schematic</title>
        {PIPES.map(({ side, branch, path }) => (
          <path
            key={path}
            d={path}
            fill="none"
            strokeWidth={side === 'low' ? 7 : 3.5}
            strokeDasharray={branch ? '2 6' : undefined}
            strokeLinecap="round"
            strokeLinejoin="round"
            className="stroke-edge"
          />
        ))}
        <rect
          x="128"
          y="18"
          width="96"
          height="52"
          rx="8"
          className="fill-raised stroke-edge"
          strokeWidth="1.5"
        />
        <path d="M138 26v36M150 26v36M202 26v36M214 26v36" className="stroke-edge" strokeWidth="1.5" />
        <rect
          x="116"
          y="490"
          width="140"
          height="52"
          rx="8"
          className="fill-raised stroke-edge"
          strokeWidth="1.5"
        />
        <path
          d="M126 498v36M138 498v36M150 498v36M224 498v36M236 498v36"
          className="stroke-edge"
          strokeWidth="1.5"
        />
        <circle cx="84" cy="416" r="34" className="fill-raised stroke-edge" strokeWidth="1.5" />
        <rect
          x="130"
          y="184"
          width="70"
          height="48"
          rx="8"
          className="fill-raised stroke-edge"
          strokeWidth="1.5"
        />
        <rect
          x="142"
          y="272"
          width="70"
          height="48"
          rx="8"
          className="fill-raised stroke-edge"
          strokeWidth="1.5"
        />
        <rect
          x="294"
          y="168"
          width="36"
          height="56"
          rx="14"
          className="fill-raised stroke-edge"
          strokeWidth="1.5"
        />
        <text x="54" y="252" className="fill-muted text-[11px]">
          low side
        </text>
        <text x="298" y="252" textAnchor="end" className="fill-muted text-[11px]">
          high side
        </text>
        <text x="176" y="354" textAnchor="middle" className="fill-muted text-[11px]">
          second branch, where fitted
        </text>
        {REFRIGERANT_SPOTS.map((spot, place) => (
          <Part
            key={spot.id}
            spot={spot}
            number={place + 1}
            name={names[spot.id] ?? spot.id}
            count={counts[spot.id] ?? 0}
            found={found.includes(spot.id)}
            selected={selected === spot.id}
            to={linkFor?.(spot.id)}
          />
        ))}
      </svg>
      <figcaption>
        <ol className="columns-2 gap-4 text-sm max-md:columns-1 sm:columns-2">
          {REFRIGERANT_SPOTS.map(({ id }, place) => (
            <li key={id} className="flex items-baseline gap-2 break-inside-avoid py-0.5">
              <span className="figures w-6 shrink-0 text-right font-semibold text-muted">{place + 1}</span>
              <span
                className={
                  found.includes(id) ? 'font-semibold text-evidence' : selected === id ? 'font-semibold' : ''
                }
              >
                {names[id] ?? id}
                {found.includes(id) && ' (finding here)'}
                {selected === id && ' (chosen)'}
                {counts[id] ? ` (${counts[id]})` : ''}
              </span>
            </li>
          ))}
        </ol>
      </figcaption>
    </figure>
  );
}

type PartProps = {
  spot: Spot;
  number: number;
  name: string;
  count: number;
  found: boolean;
  selected: boolean;
  to: string | undefined;
};

function Part({ spot: { id, x, y }, number, name, count, found, selected, to }: PartProps) {
  const half = TARGET / 2;
  const shape = (
    <>
      <rect x={x - half} y={y - half} width={TARGET} height={TARGET} fill="transparent" />
      {count > 0 && (
        <circle cx={x} cy={y} r={Math.min(22, 10 + 2 * Math.sqrt(count))} className="fill-action-soft" />
      )}
      {found && <circle cx={x} cy={y} r="19" className="fill-evidence-soft stroke-glow" strokeWidth="3" />}
      {ROUND.has(id) || found ? (
        <circle
          cx={x}
          cy={y}
          r="12"
          className={selected ? 'fill-action stroke-action' : 'fill-paper stroke-ink'}
          strokeWidth="1.5"
        />
      ) : (
        <rect
          x={x - 12}
          y={y - 11}
          width="24"
          height="22"
          rx="6"
          className={selected ? 'fill-action stroke-action' : 'fill-paper stroke-ink'}
          strokeWidth="1.5"
        />
      )}
      <text
        x={x}
        y={y + 4.5}
        textAnchor="middle"
        className={`figures text-[13px] font-semibold ${selected ? 'fill-on-action' : 'fill-ink'}`}
      >
        {number}
      </text>
    </>
  );
  if (!to) return <g>{shape}</g>;
  const said = `${name}${found ? ', finding here' : ''}${selected ? ', chosen' : ''}`;
  return (
    <Link to={to} preventScrollReset aria-label={said} aria-current={selected ? 'true' : undefined}>
      <title>{said}</title>
      {shape}
    </Link>
  );
}
