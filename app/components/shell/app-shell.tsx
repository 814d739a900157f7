import {
  BookOpenText,
  ClipboardList,
  Cog,
  Files,
  type LucideIcon,
  NotebookPen,
  Plus,
  Scale,
  Search,
  Tractor,
  Users,
} from 'lucide-react';
import type { ReactNode } from 'react';
import { Form, Link, NavLink, useLocation } from 'react-router';
import { type ToastContent, ToastMessage } from '#app/components/ui/toast.tsx';
import { ROLE_NAMES, type Role } from '#app/domain/permissions/actor.ts';
import { type Action, may } from '#app/domain/permissions/matrix.ts';
import type { Scheme } from '#app/domain/units/preferences.ts';
import { Wordmark } from './mark.tsx';
import { SchemeSwitch } from './scheme-switch.tsx';

type Place = { to: string; label: string; Icon: LucideIcon; needs: Action };

const PLACES: Place[] = [
  { to: '/bench', label: 'Bench', Icon: ClipboardList, needs: 'shop:read' },
  { to: '/find', label: 'Find', Icon: Search, needs: 'shop:read' },
  { to: '/cases', label: 'Cases', Icon: Files, needs: 'shop:read' },
  { to: '/write-ups', label: 'Write-ups', Icon: NotebookPen, needs: 'shop:read' },
  { to: '/machines', label: 'Machines', Icon: Tractor, needs: 'shop:read' },
  { to: '/refrigerant', label: 'Refrigerant', Icon: Scale, needs: 'shop:read' },
  { to: '/reference', label: 'Reference', Icon: BookOpenText, needs: 'shop:read' },
  { to: '/people', label: 'People', Icon: Users, needs: 'people:manage' },
  { to: '/settings', label: 'Settings', Icon: Cog, needs: 'shop:read' },
];

type Props = {
  viewer: { name: string; role: Role; shopName: string };
  scheme: Scheme;
  toast: ToastContent | null;
  children: ReactNode;
};

/** The frame of the signed-in pages: a rail on the desk, a bar under the thumb on the phone. */
export function AppShell({ viewer, scheme, toast, children }: Props) {
  const places = PLACES.filter(({ needs }) => may(viewer.role, needs));
  return (
    <div className="min-h-dvh lg:grid lg:grid-cols-[15rem_minmax(0,1fr)] print:block">
      <a
        href="#main"
        className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:bg-surface focus:p-3"
      >
        Skip to the page
      </a>
      <aside className="hidden border-r border-line lg:block print:hidden">
        <div className="sticky top-0 flex h-dvh flex-col gap-6 overflow-y-auto px-4 py-5">
          <Link to="/bench" className="tap inline-flex items-center rounded-lg px-2">
            <Wordmark />
          </Link>
          <nav aria-label="Places" className="flex-1">
            <ul className="space-y-1">
              {places.map((place) => (
                <li key={place.to}>
                  <RailLink {...place} />
                </li>
              ))}
            </ul>
          </nav>
          <Account viewer={viewer} scheme={scheme} />
        </div>
      </aside>
      <div className="flex min-w-0 flex-col pb-20 lg:pb-0 print:pb-0">
        <header className="flex items-center gap-3 border-b border-line px-4 py-2 sm:px-8 print:hidden">
          <Link
            to="/bench"
            className="tap inline-flex items-center lg:hidden"
            aria-label="Weepmark, to the bench"
          >
            <Wordmark />
          </Link>
          <FindBox />
        </header>
        <main id="main" className="mx-auto w-full max-w-6xl flex-1 px-4 py-6 sm:px-8 print:p-0">
          <ToastMessage toast={toast} />
          {children}
        </main>
      </div>
      <ThumbBar viewer={viewer} places={places} scheme={scheme} />
    </div>
  );
}

function RailLink({ to, label, Icon }: Place) {
  return (
    <NavLink
      to={to}
      className="tap flex items-center gap-3 rounded-lg px-3 font-semibold hover:bg-raised aria-[current=page]:bg-action-soft aria-[current=page]:text-action-deep"
    >
      <Icon className="size-5 shrink-0" aria-hidden />
      {label}
    </NavLink>
  );
}

function FindBox() {
  const { pathname } = useLocation();
  if (pathname === '/find') return <span className="flex-1" />;
  return (
    <Form action="/find" role="search" className="relative ml-auto hidden max-w-md flex-1 sm:block">
      <Search className="pointer-events-none absolute top-3 left-3 size-5 text-muted" aria-hidden />
      <input
        type="search"
        name="q"
        aria-label="Find cases"
        placeholder="Symptom, part, machine, case number"
        className="tap w-full rounded-lg border border-edge bg-surface py-2 pr-3 pl-10 text-base placeholder:text-muted"
      />
    </Form>
  );
}

function Account({ viewer, scheme }: Pick<Props, 'viewer' | 'scheme'>) {
  return (
    <div className="space-y-3 border-t border-line pt-4">
      <p className="px-2">
        <span className="block font-semibold">{viewer.name}</span>
        <span className="block text-sm text-muted">
          {ROLE_NAMES[viewer.role]}, {viewer.shopName}
        </span>
      </p>
      <SchemeSwitch scheme={scheme} />
      <Form method="post" action="/sign-out">
        <button type="submit" className="tap w-full rounded-lg px-2 text-left text-action hover:bg-raised">
          Sign out
        </button>
      </Form>
    </div>
  );
}

const THUMB = 'tap flex flex-1 flex-col items-center justify-center gap-0.5 py-1.5 text-sm font-semibold';

function ThumbBar({ viewer, places, scheme }: Pick<Props, 'viewer' | 'scheme'> & { places: Place[] }) {
  const { key } = useLocation();
  const rest = places.filter(({ to }) => to !== '/bench' && to !== '/find');
  return (
    <nav
      aria-label="Places, under the thumb"
      className="fixed inset-x-0 bottom-0 z-40 flex border-t border-line bg-surface pb-[env(safe-area-inset-bottom)] lg:hidden print:hidden"
    >
      <NavLink to="/bench" className={`${THUMB} aria-[current=page]:text-action`}>
        <ClipboardList className="size-6" aria-hidden />
        Bench
      </NavLink>
      <NavLink to="/find" className={`${THUMB} aria-[current=page]:text-action`}>
        <Search className="size-6" aria-hidden />
        Find
      </NavLink>
      {may(viewer.role, 'case:open') && (
        <NavLink to="/cases/new" className={`${THUMB} aria-[current=page]:text-action`}>
          <Plus className="size-6" aria-hidden />
          New case
        </NavLink>
      )}
      <details key={key} className="group flex-1">
        <summary className={`${THUMB} h-full list-none [&::-webkit-details-marker]:hidden`}>
          <span className="grid size-6 place-items-center text-2xl leading-none" aria-hidden>
            ⋯
          </span>
          More
        </summary>
        <div className="absolute inset-x-0 bottom-full max-h-[75dvh] overflow-y-auto border-t border-line bg-surface p-4">
          <ul className="mb-4 grid grid-cols-2 gap-1">
            {rest.map((place) => (
              <li key={place.to}>
                <RailLink {...place} />
              </li>
            ))}
          </ul>
          <Account viewer={viewer} scheme={scheme} />
        </div>
      </details>
    </nav>
  );
}
