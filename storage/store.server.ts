import type { Readable } from 'node:stream';
import {
  DeleteObjectsCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  PutObjectCommand,
  S3Client,
} from '@aws-sdk/client-s3';
import { env } from '#app/server/env.server.ts';
import { logger } from '#app/server/logger.server.ts';

/** Checksums only when asked: the default frames streamed bodies in a way that not every store takes apart again. */
const client = new S3Client({
  endpoint: env.S3_ENDPOINT,
  region: env.S3_REGION,
  forcePathStyle: true,
  requestChecksumCalculation: 'WHEN_REQUIRED',
  responseChecksumValidation: 'WHEN_REQUIRED',
  credentials: { accessKeyId: env.S3_ACCESS_KEY_ID, secretAccessKey: env.S3_SECRET_ACCESS_KEY },
});
const Bucket = env.S3_BUCKET;

export async function putObject(
  Key: string,
  Body: Readable | Uint8Array,
  ContentType: string,
  ContentLength: number,
) {
  await client.send(new PutObjectCommand({ Bucket, Key, Body, ContentType, ContentLength }));
}

export type StoredObject = { body: Readable; length: number; contentRange: string | undefined };

/** An object as a stream, whole or in an HTTP range; null when there is none. */
export async function getObject(Key: string, Range?: string): Promise<StoredObject | null> {
  try {
    const { Body, ContentLength, ContentRange } = await client.send(
      new GetObjectCommand({ Bucket, Key, Range }),
    );
    return { body: Body as Readable, length: ContentLength ?? 0, contentRange: ContentRange };
  } catch (error) {
    if (error instanceof Error && (error.name === 'NoSuchKey' || error.name === 'NotFound')) return null;
    throw error;
  }
}

/** The size of an object in bytes, or null when there is none. */
export async function objectBytes(Key: string): Promise<number | null> {
  try {
    const { ContentLength } = await client.send(new HeadObjectCommand({ Bucket, Key }));
    return ContentLength ?? 0;
  } catch (error) {
    if (error instanceof Error && (error.name === 'NoSuchKey' || error.name === 'NotFound')) return null;
    throw error;
  }
}

export async function deleteObjects(keys: readonly string[]): Promise<void> {
  if (keys.length === 0) return;
  await client.send(
    new DeleteObjectsCommand({ Bucket, Delete: { Objects: keys.map((Key) => ({ Key })), Quiet: true } }),
  );
}

export type ListedObject = { key: string; bytes: number; modifiedAt: Date };

export async function* listObjects(Prefix: string): AsyncGenerator<ListedObject> {
  let ContinuationToken: string | undefined;
  do {
    const page = await client.send(new ListObjectsV2Command({ Bucket, Prefix, ContinuationToken }));
    for (const { Key, Size, LastModified } of page.Contents ?? []) {
      if (Key) yield { key: Key, bytes: Size ?? 0, modifiedAt: LastModified ?? new Date(0) };
    }
    ContinuationToken = page.NextContinuationToken;
  } while (ContinuationToken);
}

/** Whether the object store answers. */
export async function storageAnswers(): Promise<boolean> {
  try {
    await client.send(new HeadBucketCommand({ Bucket }), { abortSignal: AbortSignal.timeout(5000) });
    return true;
  } catch (error) {
    logger.error({ err: error }, 'the object store does not answer');
    return false;
  }
}
