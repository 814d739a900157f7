import { Camera, Images, RotateCcw, X } from 'lucide-react';
import { useEffect, useId, useRef, useState } from 'react';
import { useDropzone } from 'react-dropzone';
import { useLocation } from 'react-router';
import { RadioCards } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PHOTO_ROLE_NAMES, PHOTO_ROLES, type PhotoRole } from '#app/domain/photos/photo-role.ts';
import { type Upload, useUploads } from './use-uploads.ts';

export type PhotoTarget = { caseNumber: number } | { circuitId: number };
type Props = { target: PhotoTarget; link: string; role: PhotoRole };

const ROLE_OPTIONS = PHOTO_ROLES.map((value) => ({ value, label: PHOTO_ROLE_NAMES[value] }));
const ACCEPT = { 'image/jpeg': [], 'image/png': [], 'image/webp': [], 'image/heic': [] };

/** Adding photos: camera or files, several at once, each with its progress. Without scripts it is a plain form. */
export function PhotoUploader({ target, link, role }: Props) {
  const { pathname } = useLocation();
  const form = useRef<HTMLFormElement>(null);
  const camera = useRef<HTMLInputElement>(null);
  const [scripted, setScripted] = useState(false);
  useEffect(() => setScripted(true), []);
  const { uploads, add, retry, cancel } = useUploads();
  const id = useId();
  const take = (files: readonly File[]) => {
    if (files.length === 0 || !form.current) return;
    const chosen = new FormData(form.current).get('role');
    const targetFields = Object.fromEntries(
      Object.entries(target).map(([name, value]) => [name, String(value)]),
    );
    add(files, { ...targetFields, link, role: typeof chosen === 'string' ? chosen : role });
  };
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({
    onDrop: (accepted, rejected) => take([...accepted, ...rejected.map(({ file }) => file)]),
    accept: ACCEPT,
    noClick: true,
    noKeyboard: true,
    useFsAccessApi: false,
  });
  return (
    <form
      ref={form}
      method="post"
      action="/resources/photos/upload"
      encType="multipart/form-data"
      className="space-y-4 print:hidden"
    >
      {Object.entries(target).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <input type="hidden" name="link" value={link} />
      <input type="hidden" name="to" value={pathname} />
      <RadioCards legend="The next photos show" name="role" options={ROLE_OPTIONS} defaultValue={role} />
      {scripted ? (
        <div
          {...getRootProps()}
          className={`rounded-xl border-2 border-dashed p-4 ${isDragActive ? 'border-action bg-action-soft' : 'border-edge'}`}
        >
          <input {...getInputProps({ 'aria-label': 'Photos to add' })} />
          <input
            ref={camera}
            type="file"
            accept="image/*"
            capture="environment"
            className="hidden"
            tabIndex={-1}
            aria-hidden
            onChange={(event) => {
              take([...(event.target.files ?? [])]);
              event.target.value = '';
            }}
          />
          <div className="flex flex-wrap items-center gap-2">
            <Button
              type="button"
              icon={<Camera className="size-5" aria-hidden />}
              onClick={() => camera.current?.click()}
            >
              Take a photo
            </Button>
            <Button
              type="button"
              variant="secondary"
              icon={<Images className="size-5" aria-hidden />}
              onClick={open}
            >
              Choose photos
            </Button>
            <span className="text-sm text-muted max-sm:hidden">
              or drop them here. JPEG, PNG or WebP, 25 MB at most.
            </span>
          </div>
          <ul aria-label="Photos on their way" aria-live="polite" className="mt-2 space-y-2 empty:hidden">
            {uploads.map((upload) => (
              <Row key={upload.key} upload={upload} retry={retry} cancel={cancel} />
            ))}
          </ul>
        </div>
      ) : (
        <div className="space-y-3">
          <label htmlFor={id} className="block font-semibold">
            Photos (JPEG, PNG or WebP, 25 MB at most)
          </label>
          <input id={id} type="file" name="photos" multiple accept="image/*" className="tap block w-full" />
          <Button variant="secondary">Add the photos</Button>
        </div>
      )}
    </form>
  );
}

const STATE_WORDS = {
  preparing: 'getting ready',
  sending: 'sending',
  working: 'being worked on',
  failed: 'not kept',
} as const;

function Row({
  upload,
  retry,
  cancel,
}: {
  upload: Upload;
  retry: (key: number) => void;
  cancel: (key: number) => void;
}) {
  const percent = Math.round(upload.share * 100);
  return (
    <li className="rounded-lg bg-raised py-1 pr-1 pl-3">
      <div className="flex items-center gap-2">
        <span className="min-w-0 flex-1 truncate">{upload.name}</span>
        <span className="figures text-sm text-muted">
          {STATE_WORDS[upload.state]}
          {upload.state === 'sending' && ` ${percent} %`}
        </span>
        {upload.state === 'failed' && (
          <button
            type="button"
            className="tap grid place-items-center rounded-lg text-action"
            onClick={() => retry(upload.key)}
          >
            <RotateCcw className="size-5" aria-hidden />
            <span className="sr-only">Try {upload.name} again</span>
          </button>
        )}
        <button
          type="button"
          className="tap grid place-items-center rounded-lg"
          onClick={() => cancel(upload.key)}
        >
          <X className="size-5" aria-hidden />
          <span className="sr-only">
            {upload.state === 'failed' ? 'Leave out' : 'Cancel'} {upload.name}
          </span>
        </button>
      </div>
      {upload.state === 'failed' ? (
        <p role="alert" className="pb-2 font-semibold text-danger">
          {upload.error}
        </p>
      ) : (
        <progress
          value={percent}
          max={100}
          className="block h-1.5 w-full accent-action"
          aria-label={`${upload.name}, sent`}
        />
      )}
    </li>
  );
}
