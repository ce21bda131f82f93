/** A workbook that is not read at all. The message is a sentence for its sender. */
export class WorkbookRefused extends Error {
  override readonly name = 'WorkbookRefused';

  constructor(
    readonly kind: string,
    message: string,
    cause?: unknown,
  ) {
    super(message, cause === undefined ? undefined : { cause });
  }
}
