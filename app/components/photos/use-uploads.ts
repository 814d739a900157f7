import { useCallback, useRef, useState } from 'react';
import { useRevalidator } from 'react-router';
import { shrinkPhoto } from './shrink-photo.ts';

export type Upload = {
  key: number;
  name: string;
  state: 'preparing' | 'sending' | 'working' | 'failed';
  share: number;
  error: string;
};

type Fields = Record<string, string>;
type Job = { file: File; fields: Fields; request: XMLHttpRequest | null };

const AT_ONCE = 2;
const LOST = 'The connection was lost. Nothing was kept; try again.';

/** Sends photos one by one, two at a time, with progress; each can be cancelled and tried again. */
export function useUploads() {
  const [uploads, setUploads] = useState<Upload[]>([]);
  const jobs = useRef(new Map<number, Job>());
  const waiting = useRef<number[]>([]);
  const running = useRef(0);
  const nextKey = useRef(1);
  const { revalidate } = useRevalidator();

  const change = useCallback((key: number, values: Partial<Upload>) => {
    setUploads((all) => all.map((upload) => (upload.key === key ? { ...upload, ...values } : upload)));
  }, []);

  const forget = useCallback((key: number) => {
    jobs.current.delete(key);
    setUploads((all) => all.filter((upload) => upload.key !== key));
  }, []);

  const startNext = useCallback(async () => {
    if (running.current >= AT_ONCE) return;
    const key = waiting.current.shift();
    const job = key === undefined ? undefined : jobs.current.get(key);
    if (key === undefined) return;
    if (!job) return startNext();
    running.current += 1;
    const error = await send(job, (state, share) => change(key, { state, share }));
    running.current -= 1;
    if (error === null) {
      forget(key);
      await revalidate();
    } else if (jobs.current.has(key)) change(key, { state: 'failed', error });
    return startNext();
  }, [change, forget, revalidate]);

  const enqueue = useCallback(
    (key: number) => {
      waiting.current.push(key);
      void startNext();
    },
    [startNext],
  );

  const add = useCallback(
    (files: readonly File[], fields: Fields) => {
      const added = files.map((file): Upload => {
        const key = nextKey.current;
        nextKey.current += 1;
        jobs.current.set(key, { file, fields, request: null });
        return { key, name: file.name, state: 'preparing', share: 0, error: '' };
      });
      setUploads((all) => [...all, ...added]);
      for (const { key } of added) enqueue(key);
    },
    [enqueue],
  );

  const retry = useCallback(
    (key: number) => {
      change(key, { state: 'preparing', share: 0, error: '' });
      enqueue(key);
    },
    [change, enqueue],
  );

  const cancel = useCallback(
    (key: number) => {
      const job = jobs.current.get(key);
      forget(key);
      job?.request?.abort();
    },
    [forget],
  );

  return { uploads, add, retry, cancel };
}

/** Sends one photo; answers null when it was kept, else why not. */
async function send(
  job: Job,
  report: (state: Upload['state'], share: number) => void,
): Promise<string | null> {
  const capturedAt = String(job.file.lastModified);
  const photo = await shrinkPhoto(job.file);
  const form = new FormData();
  for (const [name, value] of Object.entries({ ...job.fields, capturedAt })) form.append(name, value);
  form.append('photos', photo, photo.name);
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    job.request = request;
    request.open('POST', '/resources/photos/upload');
    request.setRequestHeader('Accept', 'application/json');
    request.responseType = 'json';
    request.upload.onprogress = ({ loaded, total, lengthComputable }) => {
      if (lengthComputable) report(loaded === total ? 'working' : 'sending', loaded / total);
    };
    request.onerror = () => resolve(LOST);
    request.ontimeout = () => resolve(LOST);
    request.onabort = () => resolve('Cancelled.');
    request.onload = () => {
      const errors: { error: string }[] = request.response?.errors ?? [];
      if (request.status === 200 && errors.length === 0) resolve(null);
      else
        resolve(
          errors.map(({ error }) => error).join(' ') || `The server answered ${request.status}. Try again.`,
        );
    };
    report('sending', 0);
    request.send(form);
  });
}
