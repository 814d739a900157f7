import { useEffect, useRef } from 'react';
import { useFetcher } from 'react-router';
import { Skeleton } from '#app/components/ui/skeleton.tsx';
import type { AlikeHit } from '#app/features/find/alike.server.ts';
import { AlikeList } from '#app/features/find/components/alike-list.tsx';

type Props = { text: string; symptoms: string; medium: string; machine: string };

const PAUSE_MS = 350;
const ENOUGH_LETTERS = 6;

/** Alike solved cases beside a complaint that is being written; it asks a moment after the last key. */
export function AlikeWhileTyping({ text, symptoms, medium, machine }: Props) {
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
  return (
    <section
      aria-label="Alike solved cases"
      aria-busy={state !== 'idle'}
      className="rounded-xl border border-line bg-surface p-4"
    >
      <h2 className="font-semibold">Solved before</h2>
      {data === undefined && state !== 'idle' ? (
        <Skeleton label="Looking for solved cases" />
      ) : data === undefined ? (
        <p className="text-muted">While you write, solved cases like this one appear here.</p>
      ) : data.hits.length === 0 ? (
        <p className="text-muted">Nothing like it yet.</p>
      ) : (
        <AlikeList hits={data.hits} newTab />
      )}
    </section>
  );
}
