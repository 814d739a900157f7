import { isRouteErrorResponse } from 'react-router';
import { ButtonLink } from '#app/components/ui/button.tsx';

const WORDS: Record<number, { title: string; text: string }> = {
  400: {
    title: 'This could not be read',
    text: 'The form did not arrive whole. Nothing was changed; go back and send it again.',
  },
  401: { title: 'Sign in first', text: 'Your session has ended. What was saved is still there.' },
  403: {
    title: 'Not for your role',
    text: 'Your role may not see or do this. If you need to, ask your lead or your shop admin.',
  },
  404: {
    title: 'Nothing here',
    text: 'This page does not exist in your shop. The link may be old, or a digit may be wrong. Nothing was lost.',
  },
  413: { title: 'Too much at once', text: 'What was sent is too large. Send less at a time.' },
};

const FAULT = {
  title: 'Something broke here',
  text: 'The fault is ours and has been noted. What was saved before is safe; go back and try the last step again.',
};

/** What happened, what was kept and what to do. `standalone` where no frame holds the page. */
export function ErrorPage({ error, standalone = false }: { error: unknown; standalone?: boolean }) {
  const status = isRouteErrorResponse(error) ? error.status : 500;
  const { title, text } = WORDS[status] ?? FAULT;
  const Frame = standalone ? 'main' : 'div';
  return (
    <Frame className="mx-auto max-w-xl space-y-4 px-4 py-16 text-center">
      <p className="figures text-sm font-semibold text-muted">{status}</p>
      <h1 className="text-3xl font-semibold">{title}</h1>
      <p className="text-lg text-muted">{text}</p>
      <p className="flex flex-wrap justify-center gap-3 pt-2">
        <ButtonLink to="/bench" variant="primary" reloadDocument={status >= 500}>
          To the bench
        </ButtonLink>
        <ButtonLink to="/find">Find a case</ButtonLink>
      </p>
    </Frame>
  );
}
