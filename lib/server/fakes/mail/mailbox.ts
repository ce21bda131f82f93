import { randomUUID } from 'node:crypto';
import { mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { type AddressObject, simpleParser } from 'mailparser';

export interface Mail {
  readonly id: string;
  readonly received: string;
  readonly from: string;
  readonly to: readonly string[];
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

const addresses = (field: AddressObject | AddressObject[] | undefined): string[] =>
  (field === undefined ? [] : [field].flat()).flatMap(({ value }) =>
    value.map(({ address }) => address ?? ''),
  );

/** Messages as they came, one `.eml` each in a folder, read back at the start; newest first. */
export class Mailbox {
  private constructor(
    private readonly folder: string,
    private mails: Mail[],
  ) {}

  static async open(folder: string): Promise<Mailbox> {
    mkdirSync(folder, { recursive: true });
    const box = new Mailbox(folder, []);
    for (const name of readdirSync(folder).sort()) {
      if (name.endsWith('.eml'))
        await box.show(name.slice(0, -'.eml'.length), readFileSync(path.join(folder, name)));
    }
    return box;
  }

  /** Keeps one message: it is on the disk before the sender hears that it was taken. */
  async keep(source: Buffer): Promise<void> {
    // The time in front makes the order of names that of arrival.
    const id = `${Date.now().toString(36).padStart(9, '0')}-${randomUUID()}`;
    const file = path.join(this.folder, `${id}.eml`);
    writeFileSync(`${file}.part`, source);
    renameSync(`${file}.part`, file);
    await this.show(id, source);
  }

  private async show(id: string, source: Buffer): Promise<void> {
    const mail = await simpleParser(source);
    this.mails.unshift({
      id,
      received: new Date(parseInt(id, 36)).toISOString(),
      from: mail.from?.text ?? '',
      to: [...addresses(mail.to), ...addresses(mail.cc)],
      subject: mail.subject ?? '',
      text: mail.text ?? '',
      html: mail.html || '',
    });
  }

  /** All messages, or those to one address. */
  list(to: string | null): readonly Mail[] {
    if (to === null) return this.mails;
    return this.mails.filter((mail) => mail.to.some((address) => address.toLowerCase() === to.toLowerCase()));
  }

  find(id: string): Mail | null {
    return this.mails.find((mail) => mail.id === id) ?? null;
  }

  /** Removes what `list` with the same address gives. */
  clear(to: string | null): void {
    for (const { id } of this.list(to)) rmSync(path.join(this.folder, `${id}.eml`), { force: true });
    const gone = new Set(this.list(to));
    this.mails = this.mails.filter((mail) => !gone.has(mail));
  }
}
