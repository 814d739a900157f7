import type { ReactNode } from 'react';
import { Form } from 'react-router';
import { Button } from '#app/components/ui/button.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';

type Props = { title: string; lead: string; formKey: string; children: ReactNode; result: ReactNode };

/** A calculator whose inputs stand in the address, so that its result can be shared. */
export function Calculator({ title, lead, formKey, children, result }: Props) {
  return (
    <>
      <PageHeader title={title} lead={lead} />
      <div className="grid items-start gap-8 lg:grid-cols-[20rem_minmax(0,1fr)]">
        <Form className="space-y-5 print:hidden" key={formKey} noValidate>
          {children}
          <Button wide>Work it out</Button>
        </Form>
        <div className="min-w-0 space-y-6" aria-live="polite">
          {result}
          <p className="text-sm text-muted">
            A guide, not the maker’s figure. Local codes and licensed people come first.
          </p>
        </div>
      </div>
    </>
  );
}
