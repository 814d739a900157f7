import { data } from 'react-router';

const MOST_BYTES = 8_000_000;

/** A request's form. One that is none, is cut off or is too large is the sender's fault and answered so. */
export async function readForm(request: Request): Promise<FormData> {
  const chunks: Uint8Array<ArrayBuffer>[] = [];
  let bytes = 0;
  for await (const chunk of request.body ?? []) {
    bytes += chunk.byteLength;
    if (bytes > MOST_BYTES) throw data(null, { status: 413 });
    chunks.push(chunk);
  }
  const headers = { 'Content-Type': request.headers.get('Content-Type') ?? '' };
  try {
    return await new Response(new Blob(chunks), { headers }).formData();
  } catch {
    throw data(null, { status: 400 });
  }
}
