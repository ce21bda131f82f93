/** An answer of the S3 protocol that is not success. */
export class S3Error extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
  ) {
    super(message);
  }
}

export const notFound = (code: 'NoSuchKey' | 'NoSuchBucket' | 'NoSuchUpload') =>
  new S3Error(404, code, 'It does not exist.');

export const preconditionFailed = () =>
  new S3Error(412, 'PreconditionFailed', 'At least one of the preconditions did not hold.');
