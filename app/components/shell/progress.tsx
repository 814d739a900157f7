import { useNavigation } from 'react-router';

/** A thin line while the next page loads. */
export function Progress() {
  const busy = useNavigation().state !== 'idle';
  return (
    <div aria-hidden className="pointer-events-none fixed inset-x-0 top-0 z-50 h-1 print:hidden">
      {busy && <div className="h-full w-full animate-pulse bg-action" />}
    </div>
  );
}
