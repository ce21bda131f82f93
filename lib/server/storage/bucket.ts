import { BucketAlreadyOwnedByYou, CreateBucketCommand, HeadBucketCommand } from '@aws-sdk/client-s3';
import { type ObjectStore, objectStore } from './client';
import { isMissing } from './failure';

/** Makes the bucket if it is not there. Throws if it is another account's. */
export async function ensureBucket(store: ObjectStore = objectStore()): Promise<void> {
  const Bucket = store.bucket;
  try {
    await store.client.send(new HeadBucketCommand({ Bucket }));
    return;
  } catch (error) {
    if (!isMissing(error))
      throw new Error(`The bucket ${Bucket} cannot be reached: ${String(error)}`, { cause: error });
  }
  try {
    await store.client.send(new CreateBucketCommand({ Bucket }));
  } catch (error) {
    if (!(error instanceof BucketAlreadyOwnedByYou)) throw error;
  }
}
