// The byte store in a bucket of an S3-compatible service, by the service's usual client.
import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  PutObjectCommand,
  S3Client,
} from "@aws-sdk/client-s3";
import { type ByteStore, checkKey } from "#app/lib/storage/store";

export interface BucketSettings {
  bucket: string;
  region: string;
  /** Address of the service; undefined = the region's own. */
  endpoint?: string;
  accessKeyId: string;
  secretAccessKey: string;
}

const absent = (error: unknown): boolean =>
  ["NoSuchKey", "NotFound"].includes((error as Error).name) ||
  (error as { $metadata?: { httpStatusCode?: number } }).$metadata?.httpStatusCode === 404;

export function bucketStore({ bucket, region, endpoint, accessKeyId, secretAccessKey }: BucketSettings): ByteStore {
  // Services other than the first one mostly know buckets by path, not by host name.
  const client = new S3Client({ region, endpoint, forcePathStyle: endpoint !== undefined, credentials: { accessKeyId, secretAccessKey } });
  const at = (key: string) => ({ Bucket: bucket, Key: checkKey(key) });
  return {
    async put(key, bytes, type) {
      await client.send(new PutObjectCommand({ ...at(key), Body: bytes, ContentType: type, ContentLength: bytes.length }));
    },
    async get(key) {
      try {
        const { Body } = await client.send(new GetObjectCommand(at(key)));
        return Body ? await Body.transformToByteArray() : null;
      } catch (error) {
        if (absent(error)) return null;
        throw error;
      }
    },
    async has(key) {
      try {
        await client.send(new HeadObjectCommand(at(key)));
        return true;
      } catch (error) {
        if (absent(error)) return false;
        throw error;
      }
    },
    async remove(key) {
      await client.send(new DeleteObjectCommand(at(key)));
    },
    async *list(prefix) {
      let next: string | undefined;
      do {
        const page = await client.send(new ListObjectsV2Command({ Bucket: bucket, Prefix: prefix, ContinuationToken: next }));
        for (const { Key, LastModified } of page.Contents ?? []) if (Key) yield { key: Key, changed: LastModified?.getTime() ?? 0 };
        next = page.IsTruncated ? page.NextContinuationToken : undefined;
      } while (next);
    },
  };
}
