import type { S3Client } from '@aws-sdk/client-s3';
import { createHash } from 'node:crypto';
import { Readable } from 'node:stream';
import { storeAway } from './store-away';
import type { FileStore } from './store';

/** A bucket of an S3-compatible store. Who may enter is read from the usual variables (AWS_ACCESS_KEY_ID …). */
export type Bucket = { name: string; endpoint: string | null; region: string };

/** Waits are short and tries few: a reader, and a transaction, wait for them. */
const CONNECT_WITHIN_MS = 3_000;
const ANSWER_WITHIN_MS = 10_000;
const TRIES = 2;

type Sdk = typeof import('@aws-sdk/client-s3');
type Ground = { sdk: Sdk; client: S3Client };

/**
 * Files as objects of one bucket, named as they would be on disk. The bucket stays private: everything is
 * read through this server. The library is large, so it is loaded at the first use.
 */
export function openBucketStore(bucket: Bucket, answerWithinMs = ANSWER_WITHIN_MS): FileStore {
  const Bucket = bucket.name;
  let ground: Promise<Ground> | null = null;
  const asked = async <T>(deed: (ground: Ground) => Promise<T>): Promise<T> => {
    try {
      return await deed(await (ground ??= loaded(bucket, answerWithinMs)));
    } catch (error) {
      throw storeAway(error);
    }
  };
  const remove = (Key: string) =>
    asked(async ({ sdk, client }) => {
      await client.send(new sdk.DeleteObjectCommand({ Bucket, Key }));
    });
  return {
    write: (Key, bytes) =>
      asked(async ({ sdk, client }) => {
        // The store refuses a body that isn't what its digest says: half of one is never kept.
        const ContentMD5 = createHash('md5').update(bytes).digest('base64');
        const ContentLength = bytes.length;
        await client.send(new sdk.PutObjectCommand({ Bucket, Key, Body: bytes, ContentMD5, ContentLength }));
      }),
    about: (Key) =>
      asked(({ sdk, client }) =>
        orNone(async () => {
          const { ContentLength, ETag } = await client.send(new sdk.HeadObjectCommand({ Bucket, Key }));
          return { sizeBytes: ContentLength ?? 0, etag: ETag ?? '""' };
        }),
      ),
    open: (Key, span) =>
      asked(({ sdk, client }) =>
        orNone(async () => {
          const range = span ? { Range: `bytes=${span.start}-${span.end}` } : {};
          const answer = await client.send(new sdk.GetObjectCommand({ Bucket, Key, ...range }));
          const { Body, ContentLength, ContentRange, ETag } = answer;
          if (!(Body instanceof Readable)) throw new Error('the store answered without a body');
          const wholeBytes = Number(/\/(\d+)$/.exec(ContentRange ?? '')?.[1] ?? ContentLength ?? 0);
          return { sizeBytes: wholeBytes, etag: ETag ?? '""', stream: Body };
        }),
      ),
    remove,
    removeFolder: async (folder) => {
      const keys = await asked(async ({ sdk, client }) => {
        const { Contents } = await client.send(
          new sdk.ListObjectsV2Command({ Bucket, Prefix: `${folder}/` }), // a folder here holds a few files
        );
        return (Contents ?? []).flatMap(({ Key }) => (Key === undefined ? [] : [Key]));
      });
      for (const key of keys) await remove(key);
    },
    check: () =>
      asked(async ({ sdk, client }) => {
        await client.send(new sdk.HeadBucketCommand({ Bucket }));
      }),
  };
}

async function loaded({ endpoint, region }: Bucket, answerWithinMs: number): Promise<Ground> {
  const sdk = await import('@aws-sdk/client-s3');
  const client = new sdk.S3Client({
    region,
    ...(endpoint === null ? {} : { endpoint }),
    forcePathStyle: endpoint !== null, // stores of one's own rarely answer to a name per bucket
    maxAttempts: TRIES,
    // Checks of one's own: not every store knows the newer ones.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    requestHandler: {
      connectionTimeout: Math.min(CONNECT_WITHIN_MS, answerWithinMs),
      requestTimeout: answerWithinMs,
      throwOnRequestTimeout: true,
      socketTimeout: answerWithinMs,
    },
  });
  return { sdk, client };
}

/** A missing object is no fault; a missing bucket is one. */
async function orNone<T>(read: () => Promise<T>): Promise<T | null> {
  try {
    return await read();
  } catch (error) {
    if (error instanceof Error && (error.name === 'NoSuchKey' || error.name === 'NotFound')) return null;
    throw error;
  }
}
