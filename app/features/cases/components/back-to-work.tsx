import { Form, useNavigation } from 'react-router';
import { Button } from '#app/components/ui/button.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { DateTime } from '#app/components/ui/time.tsx';

type Props = { number: number; backToWorkAt: string | null; provedTight: boolean; mayEdit: boolean };

/** Sending the machine back to work, once it is proved tight. */
export function BackToWork({ number, backToWorkAt, provedTight, mayEdit }: Props) {
  const pending = useNavigation().formAction?.startsWith(`/cases/${number}`) ?? false;
  return (
    <Panel title="Back to work">
      {backToWorkAt ? (
        <p>
          The machine went back to work on <DateTime value={backToWorkAt} />.
        </p>
      ) : (
        <p className="text-muted">
          {provedTight
            ? 'Proved tight: the machine may go back.'
            : 'The machine stays here until the newest proof says tight.'}
        </p>
      )}
      {mayEdit && (backToWorkAt !== null || provedTight) && (
        <Form method="post" action={`/cases/${number}?index`} className="mt-3">
          <input type="hidden" name="back" value={backToWorkAt ? 'no' : 'yes'} />
          <Button
            name="intent"
            value="back-to-work"
            variant={backToWorkAt ? 'quiet' : 'primary'}
            pending={pending}
          >
            {backToWorkAt ? 'It came back: take it off work' : 'The machine goes back to work'}
          </Button>
        </Form>
      )}
    </Panel>
  );
}
