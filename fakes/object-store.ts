import { mkdir } from 'node:fs/promises';
import S3rver from 's3rver';

export type ObjectStore = { stop(): Promise<void> };

export const OBJECT_STORE_ACCOUNT = { accessKeyId: 'S3RVER', secretAccessKey: 'S3RVER' } as const;
export const BUCKET = 'weepmark-photos';

/** The object-store fake on loopback, over a folder. It checks no secrets: access control is the product's own. */
export async function startObjectStore({
  folder,
  port,
}: {
  folder: string;
  port: number;
}): Promise<ObjectStore> {
  await mkdir(folder, { recursive: true });
  const server = new S3rver({
    address: '127.0.0.1',
    port,
    directory: folder,
    silent: true,
    configureBuckets: [{ name: BUCKET, configs: [] }],
  });
  await server.run();
  return { stop: () => server.close() };
}
