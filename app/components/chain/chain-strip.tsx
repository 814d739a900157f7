import { useEffect, useRef } from 'react';
import { Link } from 'react-router';
import {
  type ChainLink,
  LINK_NAMES,
  LINK_STATE_NAMES,
  type LinkKey,
  type LinkState,
} from '#app/domain/chain/chain.ts';

type Props = { links: readonly ChainLink[]; caseNumber: number; current?: LinkKey };

/** The seven links of a case: a rail on the desk, a strip to swipe on the phone; each leads to its page. */
export function ChainStrip({ links, caseNumber, current }: Props) {
  const here = useRef<HTMLAnchorElement>(null);
  useEffect(() => {
    if (!current) return;
    const item = here.current;
    const strip = item?.closest('ol');
    if (item && strip) strip.scrollLeft = item.offsetLeft - strip.offsetLeft - 24;
  }, [current]);
  return (
    <nav aria-label="Evidence chain" className="print:hidden">
      <ol className="-mx-4 flex snap-x overflow-x-auto px-4 pb-2 sm:mx-0 sm:px-0 lg:overflow-visible">
        {links.map(({ key, state, lacks }, place) => (
          <li key={key} className="relative min-w-26 flex-1 snap-start">
            {place > 0 && <Joint done={state !== 'missing' && links[place - 1]?.state !== 'missing'} />}
            <Link
              ref={key === current ? here : undefined}
              to={`/cases/${caseNumber}/${key}`}
              aria-current={key === current ? 'page' : undefined}
              title={lacks.length > 0 ? `Still lacks ${lacks.join(', ')}` : undefined}
              className="group tap flex flex-col items-center gap-1 rounded-lg px-1 py-2 text-center hover:bg-raised aria-[current=page]:bg-action-soft"
            >
              <LinkShape state={state} />
              <span className="font-semibold group-aria-[current=page]:text-action-deep">
                {LINK_NAMES[key]}
              </span>
              <span className="text-sm text-muted">{LINK_STATE_NAMES[state]}</span>
            </Link>
          </li>
        ))}
      </ol>
    </nav>
  );
}

function Joint({ done }: { done: boolean }) {
  return (
    <span
      aria-hidden
      className={`absolute top-[1.35rem] right-[calc(50%+1.25rem)] left-[calc(-50%+1.25rem)] border-t-2 ${done ? 'border-action' : 'border-dashed border-edge'}`}
    />
  );
}

/** Missing: an open ring. Partly: a ring half full. Done: a full ring with a tick. */
export function LinkShape({ state, small = false }: { state: LinkState; small?: boolean }) {
  return (
    <svg
      viewBox="0 0 28 28"
      className={`relative ${small ? 'size-3.5' : 'size-7'}`}
      fill="none"
      aria-hidden="true"
    >
      <rect
        x="3"
        y="3"
        width="22"
        height="22"
        rx="11"
        strokeWidth="2.5"
        strokeDasharray={state === 'missing' ? '4 3.2' : undefined}
        className={
          state === 'missing'
            ? 'fill-paper stroke-edge'
            : state === 'done'
              ? 'fill-action stroke-action'
              : 'fill-paper stroke-action'
        }
      />
      {state === 'partly' && <path d="M14 5.500a8.5 8.5 0 0 1 0 17Z" className="fill-action" />}
      {state === 'done' && (
        <path
          d="M9 14.500l3.5 3.500L19.5 10.5"
          className="stroke-on-action"
          strokeWidth="2.8"
          strokeLinecap="round"
          strokeLinejoin="round"
        />
      )}
    </svg>
  );
}

/** The chain in a list: seven small shapes and their summary in words. */
export function ChainDots({ links }: { links: readonly ChainLink[] }) {
  const done = links.filter(({ state }) => state === 'done').length;
  return (
    <span className="inline-flex items-center gap-0.5">
      {links.map(({ key, state }) => (
        <LinkShape key={key} state={state} small />
      ))}
      <span className="sr-only">
        {done} of {links.length} links done
      </span>
    </span>
  );
}
