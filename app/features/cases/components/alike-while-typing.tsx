import { useEffect, useRef } from 'react';
import { useFetcher } from 'react-router';
import { Skeleton } from '#app/components/ui/skeleton.tsx';
import type { AlikeHit } from '#app/features/find/alike.server.ts';
import { AlikeList } from '#app/features/find/components/alike-list.tsx';

type Draft = { text: string; symptoms: string; medium: string; machine: string };
type Alike = { hits: AlikeHit[] | undefined; busy: boolean };

const PAUSE_MS = 350;
const ENOUGH_LETTERS = 6;

/** The solved cases like a complaint that is being written; asks a moment after the last key. */
export function useAlike({ text, symptoms, medium, machine }: Draft): Alike {
  const { load, data, state } = useFetcher<{ hits: AlikeHit[] }>();
  const asked = useRef('');
  useEffect(() => {
    if (text.trim().length < ENOUGH_LETTERS && symptoms === '') return;
    const query = new URLSearchParams({ text: text.slice(0, 1500), symptoms, medium, machine }).toString();
    if (query === asked.current) return;
    const timer = setTimeout(() => {
      asked.current = query;
      void load(`/resources/alike?${query}`);
    }, PAUSE_MS);
    return () => clearTimeout(timer);
  }, [text, symptoms, medium, machine, load]);
  return { hits: data?.hits, busy: state !== 'idle' };
}

export function AlikePanel({ hits, busy }: Alike) {
  return (
    <section
      aria-label="Alike solved cases"
      aria-busy={busy}
      className="rounded-xl border border-line bg-surface p-4"
    >
      <h2 className="font-semibold">Solved before</h2>
      {hits === undefined && busy ? (
        <Skeleton label="Looking for solved cases" />
      ) : hits === undefined ? (
        <p className="text-muted">While you write, solved cases like this one appear here.</p>
      ) : hits.length === 0 ? (
        <p className="text-muted">Nothing like it yet.</p>
      ) : (
        <AlikeList hits={hits} newTab />
      )}
    </section>
  );
}
