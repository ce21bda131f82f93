'use client';

import { useRouter } from 'next/navigation';
import { type FormEvent, useEffect, useRef, useState } from 'react';
import { problemWords } from '@/components/lists/ask';
import { type Peek, peekFile } from '@/components/lists/mapping/peek-file';
import { Actions } from '@/components/ui/actions';
import { Banner } from '@/components/ui/banner';
import { Button, ButtonLink } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/choice';
import { FileField } from '@/components/ui/file-field';
import { FormGrid } from '@/components/ui/form-grid';
import { ProgressBar } from '@/components/ui/progress-bar';
import { TextArea } from '@/components/ui/text-area';
import { fileTakenSchema } from '@/lib/contracts/list-imports';

interface UploadFormProps {
  /** The internal route that takes the file. */
  readonly to: string;
  /** The list's page; those of its imports and pending uploads stand below it. */
  readonly listHref: string;
  readonly cancelHref: string;
}

const PEEK_WORDS: Readonly<Record<Peek, string>> = {
  contract: 'Its headings are those of the contract: it is read as it stands.',
  other: 'Its headings are not those of the contract. It is stored first; then you say what each column is.',
  workbook: 'A workbook. It is stored first; then you choose the sheet and say what each column is.',
};

interface Sending {
  readonly sent: number;
  readonly size: number;
}

/** Sends a file to a list, with the reason for the revision it becomes, and leads on to the page of its import. */
export function UploadForm({ to, listHref, cancelHref }: UploadFormProps) {
  const router = useRouter();
  const [file, setFile] = useState<File | null>(null);
  const [peek, setPeek] = useState<Peek | null>(null);
  const [sending, setSending] = useState<Sending | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const request = useRef<XMLHttpRequest | null>(null);
  useEffect(() => () => request.current?.abort(), []);

  const send = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (file === null) return;
    const form = new FormData(event.currentTarget);
    const asked = new URLSearchParams({ reason: String(form.get('reason') ?? '') });
    if (form.get('by-hand') !== null) asked.set('by', 'hand');
    setFailure(null);
    setSending({ sent: 0, size: file.size });
    const started = sendFile(`${to}?${asked.toString()}`, file, (sent) =>
      setSending({ sent, size: file.size }),
    );
    request.current = started.request;
    started.answer.then(
      (page) => router.push(`${listHref}/${page}`),
      (error: unknown) => {
        setSending(null);
        setFailure(error instanceof Error ? error.message : String(error));
      },
    );
  };

  return (
    <form onSubmit={send}>
      <FormGrid>
        {failure === null ? null : (
          <Banner severity="blocker" word="Failed" live title="The file was not stored">
            <p>{failure}</p>
          </Banner>
        )}
        <FileField
          name="file"
          label="File"
          hint="CSV in UTF-8, with commas, semicolons or tabs, up to 1 GiB; or a sheet of an .xlsx workbook, up to 32 MiB and 100,000 rows."
          accept=".csv,.txt,.tsv,.xlsx,text/csv,text/tab-separated-values,text/plain"
          required
          disabled={sending !== null}
          onFile={(chosen) => {
            setFile(chosen);
            setPeek(null);
            if (chosen !== null)
              peekFile(chosen).then(setPeek, (error: unknown) => setFailure(String(error)));
          }}
        />
        {peek === null ? null : (
          <p role="status" className="measure text-note text-ink-2">
            {PEEK_WORDS[peek]}
          </p>
        )}
        {peek === 'contract' ? (
          <Checkbox
            name="by-hand"
            label="Map its columns by hand all the same"
            hint="For thousands separators, totals rows, or units by column."
          />
        ) : null}
        <TextArea
          name="reason"
          label="Reason for this revision"
          hint="What changed and why; it stays with the revision."
          rows={3}
          maxLength={1000}
          required
          readOnly={sending !== null}
        />
        {sending === null ? (
          <Actions>
            <Button kind="primary" type="submit">
              Upload file
            </Button>
            <ButtonLink href={cancelHref} kind="quiet">
              Leave without uploading
            </ButtonLink>
          </Actions>
        ) : (
          <>
            <ProgressBar
              label={sending.sent < sending.size ? 'Uploading' : 'Storing'}
              done={Math.ceil(sending.sent / 1000)}
              total={Math.ceil(sending.size / 1000)}
              of="kB"
            />
            <Actions>
              <Button onClick={() => request.current?.abort()}>Stop upload</Button>
            </Actions>
          </>
        )}
      </FormGrid>
    </form>
  );
}

/** Answers with the page, below the list's, that goes on with the file. fetch tells nothing of what has been sent; XMLHttpRequest does. */
function sendFile(
  url: string,
  file: File,
  onProgress: (sent: number) => void,
): { readonly request: XMLHttpRequest; readonly answer: Promise<string> } {
  const request = new XMLHttpRequest();
  const answer = new Promise<string>((resolve, reject) => {
    request.upload.onprogress = (event) => onProgress(event.loaded);
    request.onabort = () => reject(new Error('The upload was stopped. Nothing was stored.'));
    request.onerror = () => reject(new Error(problemWords(null, 0)));
    request.onload = () => {
      const taken = fileTakenSchema.safeParse(request.response);
      if (request.status === 202 && taken.success)
        resolve('import' in taken.data ? `imports/${taken.data.import}` : `uploads/${taken.data.upload}`);
      else reject(new Error(problemWords(request.response, request.status)));
    };
    request.open('POST', url);
    request.responseType = 'json';
    request.setRequestHeader('Content-Type', 'text/csv');
    request.setRequestHeader('X-File-Name', encodeURIComponent(file.name));
    request.send(file);
  });
  return { request, answer };
}
