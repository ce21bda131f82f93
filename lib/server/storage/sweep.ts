import {
  AbortMultipartUploadCommand,
  DeleteObjectCommand,
  ListMultipartUploadsCommand,
  paginateListObjectsV2,
} from '@aws-sdk/client-s3';
import { type ObjectStore, objectStore } from './client';
import { INCOMING } from './keys';

/**
 * Removes what uploads that never ended left behind and that is older than `before`; returns how many.
 * Multipart uploads beyond the store's first page (1000) wait for the next sweep.
 */
export async function sweepIncoming(before: Date, store: ObjectStore = objectStore()): Promise<number> {
  const { client, bucket: Bucket } = store;
  let swept = 0;
  for await (const page of paginateListObjectsV2({ client }, { Bucket, Prefix: INCOMING })) {
    for (const { Key, LastModified } of page.Contents ?? []) {
      if (!LastModified || LastModified >= before) continue;
      await client.send(new DeleteObjectCommand({ Bucket, Key }));
      swept += 1;
    }
  }
  const open = await client.send(new ListMultipartUploadsCommand({ Bucket, Prefix: INCOMING }));
  for (const { Key, UploadId, Initiated } of open.Uploads ?? []) {
    if (!Initiated || Initiated >= before) continue;
    await client.send(new AbortMultipartUploadCommand({ Bucket, Key, UploadId }));
    swept += 1;
  }
  return swept;
}
