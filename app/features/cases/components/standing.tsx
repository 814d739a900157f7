import { Form, useNavigation } from 'react-router';
import { SelectField, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { Facts, Panel } from '#app/components/ui/panel.tsx';
import { DateTime } from '#app/components/ui/time.tsx';
import type { Refusal } from '#app/features/outcome.ts';
import type { CaseHead } from '../queries.server.ts';
import { RefusalNotice } from './refusal-notice.tsx';

type Props = {
  head: CaseHead;
  may: { park: boolean; close: boolean; assign: boolean; share: boolean };
  sent: { form: string; refusal: Refusal; typed: Record<string, string>; link: string | null } | undefined;
};

const SUMMARY = 'tap flex items-center font-semibold text-action';

/** Where a case stands and who has it: parking, closing, handing over, sharing. */
export function Standing({ head, may, sent }: Props) {
  const intent = useNavigation().formData?.get('intent');
  const stopped = head.parkedReason !== null || head.closedReason !== null;
  const mine = (form: string) => (sent?.form === form ? sent : undefined);
  const errors = (form: string) => {
    const refusal = mine(form)?.refusal;
    return refusal?.refused === 'fields' ? refusal.fields : {};
  };
  return (
    <Panel title="Where it stands">
      <Facts
        columns={1}
        facts={[
          { label: 'In the hands of', value: head.assignee?.name ?? 'nobody' },
          { label: 'Yard', value: head.yardName },
          { label: 'Back to work', value: head.backToWorkAt && <DateTime value={head.backToWorkAt} /> },
          { label: 'Stood for', value: head.downtimeHours === null ? '' : `${head.downtimeHours} hours` },
        ]}
      />
      <div className="mt-2 print:hidden">
        {stopped && (head.closedReason === null ? may.park : may.close) && (
          <Form method="post">
            <Button name="intent" value="resume" variant="secondary" pending={intent === 'resume'}>
              Take it up again
            </Button>
          </Form>
        )}
        {!stopped && may.park && (
          <details open={mine('park') !== undefined}>
            <summary className={SUMMARY}>Park it</summary>
            <Form method="post" className="space-y-4 pt-2 pb-4" noValidate>
              <RefusalNotice refusal={mine('park')?.refusal} />
              <TextField
                name="reason"
                label="What it waits for"
                defaultValue={mine('park')?.typed.reason}
                error={errors('park').reason}
              />
              <TextField
                name="until"
                label="Until"
                type="date"
                defaultValue={mine('park')?.typed.until}
                error={errors('park').until}
              />
              <Button name="intent" value="park" variant="secondary" pending={intent === 'park'}>
                Park the case
              </Button>
            </Form>
          </details>
        )}
        {may.assign && (
          <details open={mine('assign') !== undefined}>
            <summary className={SUMMARY}>Hand it over</summary>
            <Form method="post" className="space-y-4 pt-2 pb-4" noValidate>
              <SelectField
                name="assignee"
                label="To"
                blank="Nobody"
                options={head.people.map(({ id, name }) => ({ value: String(id), label: name }))}
                defaultValue={head.assignee ? String(head.assignee.id) : ''}
                error={errors('assign').assignee}
              />
              <Button name="intent" value="assign" variant="secondary" pending={intent === 'assign'}>
                Hand over
              </Button>
            </Form>
          </details>
        )}
        {head.closedReason === null && may.close && (
          <details open={mine('close') !== undefined}>
            <summary className={SUMMARY}>Close it unsolved</summary>
            <Form method="post" className="space-y-4 pt-2 pb-4" noValidate>
              <RefusalNotice refusal={mine('close')?.refusal} />
              <TextField
                name="reason"
                label="Why"
                defaultValue={mine('close')?.typed.reason}
                error={errors('close').reason}
              />
              <Button name="intent" value="close" variant="danger" pending={intent === 'close'}>
                Close the case
              </Button>
            </Form>
          </details>
        )}
        {may.share && (
          <details open={mine('share') !== undefined}>
            <summary className={SUMMARY}>Share the report by link</summary>
            <Form method="post" className="space-y-4 pt-2 pb-4">
              {mine('share')?.link && (
                <Notice title="The link, shown once">
                  <p className="break-all select-all">{mine('share')?.link}</p>
                </Notice>
              )}
              <SelectField
                name="days"
                label="Works for"
                options={[
                  { value: '7', label: 'a week' },
                  { value: '30', label: 'a month' },
                  { value: '90', label: 'three months' },
                ]}
              />
              <p className="text-sm text-muted">
                Whoever has the link reads the report with its photos. People’s names, the machine’s serial
                number and the history stay out.
              </p>
              <Button name="intent" value="share" variant="secondary" pending={intent === 'share'}>
                Make a link
              </Button>
            </Form>
          </details>
        )}
      </div>
    </Panel>
  );
}
