import { useEffect, useState } from 'react';
import { Form, useFetcher, useNavigation } from 'react-router';
import { TextArea, TextField } from '#app/components/forms/field.tsx';
import { PhotoPicker } from '#app/components/photos/photo-picker.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { type Refusal, versionToSend } from '#app/features/outcome.ts';
import type { PhotoView } from '#app/features/photos/views.ts';

type Props = {
  title: string;
  body: string;
  html: string;
  photoIds: readonly number[];
  photos: readonly PhotoView[];
  version: number | undefined;
  published: boolean;
  mayReview: boolean;
  mayOverride: boolean;
  submittable: boolean;
  refusal: Refusal | undefined;
};

const PAUSE_MS = 400;

/** The note in Markdown with its preview beside it and the case's photos to pick from. */
export function NoteEditor(props: Props) {
  const { title, photoIds, photos, version, published, mayReview, mayOverride, submittable, refusal } = props;
  const [body, setBody] = useState(props.body);
  const preview = useFetcher<{ html: string }>();
  const { submit } = preview;
  useEffect(() => {
    if (body === props.body) return;
    const timer = setTimeout(() => {
      void submit({ body }, { method: 'post', action: '/resources/preview' });
    }, PAUSE_MS);
    return () => clearTimeout(timer);
  }, [body, props.body, submit]);
  const intent = useNavigation().formData?.get('intent');
  const errors = refusal?.refused === 'fields' ? refusal.fields : {};
  const gated = refusal?.refused === 'gate';
  return (
    <Form method="post" className="space-y-5" noValidate>
      {version !== undefined && (
        <input type="hidden" name="version" value={versionToSend(refusal, version)} />
      )}
      <RefusalNotice refusal={refusal} />
      {gated && mayOverride && (
        <div className="space-y-3 rounded-xl border border-danger p-4">
          <TextArea
            name="override"
            label="Publish all the same, because"
            hint="Your name and this reason stay on the record."
            rows={2}
          />
          <Button name="intent" value="publish" variant="danger" pending={intent === 'publish'}>
            Override and publish
          </Button>
        </div>
      )}
      <TextField
        name="title"
        label="Title"
        hint="What a mechanic would look for."
        defaultValue={title}
        error={errors.title}
      />
      <div className="grid gap-5 lg:grid-cols-2">
        <TextArea
          name="body"
          label="The note"
          hint="Markdown: **bold**, lists with -, headings with ###."
          rows={22}
          value={body}
          onChange={(event) => setBody(event.target.value)}
          error={errors.body}
        />
        <section aria-label="Preview">
          <p className="mb-1 font-semibold">As it will look</p>
          <div
            className="prose-note rounded-lg border border-line bg-surface p-4"
            // biome-ignore lint/security/noDangerouslySetInnerHtml: sanitised on the server
            dangerouslySetInnerHTML={{ __html: preview.data?.html ?? props.html }}
          />
        </section>
      </div>
      {photos.length > 0 && (
        <PhotoPicker legend="Photos in the note" name="photos" photos={photos} selected={photoIds} />
      )}
      <div className="flex flex-wrap gap-2">
        {!published && (
          <Button
            name="intent"
            value="save"
            variant={mayReview ? 'secondary' : 'primary'}
            pending={intent === 'save'}
          >
            Save the draft
          </Button>
        )}
        {submittable && (
          <Button name="intent" value="submit" variant="secondary" pending={intent === 'submit'}>
            Save and send to review
          </Button>
        )}
        {mayReview && (
          <Button name="intent" value="publish-now" pending={intent === 'publish-now'}>
            {published ? 'Publish the revision' : 'Publish'}
          </Button>
        )}
      </div>
    </Form>
  );
}
