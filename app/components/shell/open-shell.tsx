import type { ReactNode } from 'react';
import { Link } from 'react-router';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { type ToastContent, ToastMessage } from '#app/components/ui/toast.tsx';
import type { Scheme } from '#app/domain/units/preferences.ts';
import { Wordmark } from './mark.tsx';
import { SchemeSwitch } from './scheme-switch.tsx';

type Props = { signedIn: boolean; scheme: Scheme; toast: ToastContent | null; children: ReactNode };

/** The frame of pages that need no account. */
export function OpenShell({ signedIn, scheme, toast, children }: Props) {
  return (
    <div className="flex min-h-dvh flex-col">
      <header className="flex items-center justify-between gap-4 px-4 py-3 sm:px-8 print:hidden">
        <Link to="/" className="tap inline-flex items-center rounded-lg">
          <Wordmark />
        </Link>
        <ButtonLink to={signedIn ? '/bench' : '/sign-in'} variant="quiet">
          {signedIn ? 'To the bench' : 'Sign in'}
        </ButtonLink>
      </header>
      <main id="main" className="w-full flex-1 px-4 py-8 sm:px-8">
        <ToastMessage toast={toast} />
        {children}
      </main>
      <footer className="flex flex-wrap items-center justify-between gap-4 border-t border-line px-4 py-4 text-sm text-muted sm:px-8 print:hidden">
        <p>A guide, not the maker’s figure. Local codes and licensed people come first.</p>
        <SchemeSwitch scheme={scheme} />
      </footer>
    </div>
  );
}
