import { ArrowDown, ArrowUp } from 'lucide-react';
import type { ReactNode } from 'react';
import { Form, useLocation } from 'react-router';
import { SelectField, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { DateTime } from '#app/components/ui/time.tsx';
import type { LinkKey } from '#app/domain/chain/chain.ts';
import { PHOTO_ROLE_NAMES, PHOTO_ROLES, type PhotoRole } from '#app/domain/photos/photo-role.ts';
import type { PhotoList, PhotoView } from '#app/features/photos/views.ts';
import { PhotoFigure } from './photo-strip.tsx';
import { type PhotoTarget, PhotoUploader } from './photo-uploader.tsx';

type Props = { title: string; photoRole: PhotoRole; photos: PhotoList } & (
  | { caseNumber: number; link: LinkKey }
  | { circuitId: number; link?: undefined }
);

/** The photos of a link or a circuit: to look at, describe, order, delete and bring back, and to add more. */
export function PhotoSection(props: Props) {
  const { title, photoRole, photos, link } = props;
  const target: PhotoTarget =
    'caseNumber' in props ? { caseNumber: props.caseNumber } : { circuitId: props.circuitId };
  const deleted = photos.deleted.filter((photo) => link === undefined || photo.link === link);
  return (
    <Panel title={title} id="photos">
      {photos.photos.length === 0 && <p className="mb-4 text-muted">No photo yet.</p>}
      <ul className="mb-5 grid gap-5 sm:grid-cols-2 lg:grid-cols-3">
        {photos.photos.map((photo, place) => (
          <li key={photo.id}>
            <PhotoFigure photo={photo} />
            <p className="text-sm text-muted">
              {photo.capturedAt ? (
                <>
                  Taken <DateTime value={photo.capturedAt} />
                  {photo.capturedAtSource === 'browser' && ', as the file says'}
                </>
              ) : (
                'Time taken unknown'
              )}
              {photo.uploadedByName && `, added by ${photo.uploadedByName}`}
            </p>
            {photos.mayAdd && (
              <PhotoTools photo={photo} first={place === 0} last={place === photos.photos.length - 1} />
            )}
          </li>
        ))}
      </ul>
      {deleted.length > 0 && (
        <ul className="mb-5 space-y-2">
          {deleted.map((photo) => (
            <li key={photo.id} className="flex flex-wrap items-center gap-3 text-muted">
              {photo.roleName} photo deleted{photo.caption && ` (${photo.caption})`}
              <PhotoForm photoId={photo.id}>
                <Button name="intent" value="restore" variant="quiet">
                  Undo
                </Button>
              </PhotoForm>
            </li>
          ))}
        </ul>
      )}
      {photos.mayAdd && <PhotoUploader target={target} link={link ?? ''} role={photoRole} />}
    </Panel>
  );
}

function PhotoForm({
  photoId,
  children,
  className,
}: {
  photoId: number;
  children: ReactNode;
  className?: string;
}) {
  const { pathname } = useLocation();
  return (
    <Form method="post" action={`/resources/photos/${photoId}`} preventScrollReset className={className}>
      <input type="hidden" name="to" value={pathname} />
      {children}
    </Form>
  );
}

function PhotoTools({ photo, first, last }: { photo: PhotoView; first: boolean; last: boolean }) {
  return (
    <details className="print:hidden">
      <summary className="tap flex items-center text-action">Describe, order or delete</summary>
      <PhotoForm photoId={photo.id} className="space-y-3 pb-2">
        <TextField name="caption" label="Caption" defaultValue={photo.caption} maxLength={1000} />
        <SelectField
          name="role"
          label="It shows"
          options={PHOTO_ROLES.map((value) => ({ value, label: PHOTO_ROLE_NAMES[value] }))}
          defaultValue={photo.role}
        />
        <Button name="intent" value="describe" variant="secondary">
          Save
        </Button>
      </PhotoForm>
      <div className="flex flex-wrap gap-2">
        {!first && (
          <PhotoForm photoId={photo.id}>
            <input type="hidden" name="intent" value="move" />
            <Button name="by" value="up" variant="quiet" icon={<ArrowUp className="size-5" aria-hidden />}>
              Earlier
            </Button>
          </PhotoForm>
        )}
        {!last && (
          <PhotoForm photoId={photo.id}>
            <input type="hidden" name="intent" value="move" />
            <Button
              name="by"
              value="down"
              variant="quiet"
              icon={<ArrowDown className="size-5" aria-hidden />}
            >
              Later
            </Button>
          </PhotoForm>
        )}
        {photo.mayDelete && (
          <PhotoForm photoId={photo.id}>
            <Button name="intent" value="delete" variant="danger">
              Delete
            </Button>
          </PhotoForm>
        )}
        {photo.original && (
          <a href={photo.original} className="link tap inline-flex items-center px-2">
            Original
          </a>
        )}
      </div>
    </details>
  );
}
