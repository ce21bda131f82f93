import { createHash, randomUUID } from 'node:crypto';
import {
  closeSync,
  existsSync,
  openSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { mkdir } from 'node:fs/promises';
import path from 'node:path';
import { notFound, preconditionFailed, S3Error } from './errors';

/** What is kept of an object beside its bytes. `headers` are those that come back with it: content type, metadata ... */
export interface ObjectRecord {
  readonly key: string;
  readonly file: string;
  readonly size: number;
  readonly etag: string;
  readonly modified: string;
  readonly headers: Readonly<Record<string, string>>;
}

export interface Part {
  readonly number: number;
  readonly file: string;
  readonly size: number;
  readonly md5: string;
  readonly sha256: string;
}

export interface Upload {
  readonly id: string;
  readonly key: string;
  readonly started: string;
  readonly headers: Readonly<Record<string, string>>;
}

function readJson<T>(file: string): T | null {
  return existsSync(file) ? (JSON.parse(readFileSync(file, 'utf8')) as T) : null;
}

/** A record appears whole or not at all. */
function writeJson(file: string, value: unknown): void {
  const fresh = `${file}.${randomUUID()}`;
  writeFileSync(fresh, JSON.stringify(value));
  renameSync(fresh, file);
}

/**
 * Buckets in folders: `objects/<sha256 of the key>.json` beside files of bytes with names of their own, so that an
 * object is replaced by one rename. Conditions are checked in the same turn as that rename, so they hold in one process.
 */
export class DiskStore {
  constructor(private readonly root: string) {}

  async createBucket(bucket: string): Promise<void> {
    if (!/^[a-z0-9][a-z0-9.-]{2,62}$/.test(bucket)) {
      throw new S3Error(400, 'InvalidBucketName', 'The name is not one of a bucket.');
    }
    if (existsSync(path.join(this.root, bucket))) {
      throw new S3Error(409, 'BucketAlreadyOwnedByYou', 'The bucket exists and is yours.');
    }
    await mkdir(path.join(this.root, bucket, 'objects'), { recursive: true });
    await mkdir(path.join(this.root, bucket, 'uploads'), { recursive: true });
    await mkdir(path.join(this.root, bucket, 'bytes'), { recursive: true });
  }

  /** The bucket's folder; 404 without one. */
  private bucket(bucket: string, ...rest: string[]): string {
    const folder = path.join(this.root, bucket);
    if (!/^[a-z0-9][a-z0-9.-]+$/.test(bucket) || !existsSync(folder)) throw notFound('NoSuchBucket');
    return path.join(folder, ...rest);
  }

  checkBucket(bucket: string): void {
    this.bucket(bucket);
  }

  /** A new place for bytes in the bucket. */
  freshFile(bucket: string): string {
    return this.bucket(bucket, 'bytes', randomUUID());
  }

  private recordFile(bucket: string, key: string): string {
    return this.bucket(bucket, 'objects', `${createHash('sha256').update(key).digest('hex')}.json`);
  }

  has(bucket: string, key: string): boolean {
    return existsSync(this.recordFile(bucket, key));
  }

  find(bucket: string, key: string): ObjectRecord {
    const record = readJson<ObjectRecord>(this.recordFile(bucket, key));
    if (!record) throw notFound('NoSuchKey');
    return record;
  }

  /** The object with its bytes held open, so that a later replacement or removal does not touch them. */
  open(bucket: string, key: string): { readonly record: ObjectRecord; readonly fd: number } {
    const record = this.find(bucket, key);
    return { record, fd: openSync(record.file, 'r') };
  }

  /** Puts the record in place; with `mustBeNew` 412 if the key is taken, and the new bytes go. */
  commit(bucket: string, record: Omit<ObjectRecord, 'modified'>, mustBeNew: boolean): ObjectRecord {
    const file = this.recordFile(bucket, record.key);
    const former = readJson<ObjectRecord>(file);
    if (former && mustBeNew) {
      rmSync(record.file, { force: true });
      throw preconditionFailed();
    }
    const whole = { ...record, modified: new Date().toISOString() };
    writeJson(file, whole);
    if (former) rmSync(former.file, { force: true });
    return whole;
  }

  remove(bucket: string, key: string): void {
    const file = this.recordFile(bucket, key);
    const record = readJson<ObjectRecord>(file);
    if (!record) return;
    rmSync(file);
    rmSync(record.file, { force: true });
  }

  /** All objects whose key begins with `prefix`, in the order of their keys. */
  list(bucket: string, prefix: string): ObjectRecord[] {
    const folder = this.bucket(bucket, 'objects');
    return readdirSync(folder)
      .filter((name) => name.endsWith('.json'))
      .map((name) => readJson<ObjectRecord>(path.join(folder, name)))
      .filter((record) => record !== null)
      .filter((record) => record.key.startsWith(prefix))
      .sort((a, b) => (a.key < b.key ? -1 : 1));
  }

  async createUpload(bucket: string, key: string, headers: Upload['headers']): Promise<Upload> {
    const upload = { id: randomUUID(), key, started: new Date().toISOString(), headers };
    const folder = this.bucket(bucket, 'uploads', upload.id);
    await mkdir(folder);
    writeJson(path.join(folder, 'upload.json'), upload);
    return upload;
  }

  /** The folder of an open upload of `key`; 404 without one. */
  uploadFolder(bucket: string, key: string, id: string): string {
    const folder = this.bucket(bucket, 'uploads', /^[0-9a-f-]{36}$/.test(id) ? id : 'none');
    if (readJson<Upload>(path.join(folder, 'upload.json'))?.key !== key) throw notFound('NoSuchUpload');
    return folder;
  }

  upload(folder: string): Upload {
    const upload = readJson<Upload>(path.join(folder, 'upload.json'));
    if (!upload) throw notFound('NoSuchUpload');
    return upload;
  }

  savePart(folder: string, part: Part): void {
    const file = path.join(folder, `${part.number}.part.json`);
    const former = readJson<Part>(file);
    writeJson(file, part);
    if (former) rmSync(former.file, { force: true });
  }

  part(folder: string, number: number): Part | null {
    return readJson<Part>(path.join(folder, `${number}.part.json`));
  }

  removeUpload(folder: string): void {
    rmSync(folder, { recursive: true, force: true });
  }

  uploads(bucket: string): Upload[] {
    const folder = this.bucket(bucket, 'uploads');
    return readdirSync(folder).map((id) => this.upload(path.join(folder, id)));
  }
}

/** Closes a file that `open` gave and that no stream took over. */
export const close = (fd: number): void => closeSync(fd);
