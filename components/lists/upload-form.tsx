'use client';

import { useRouter } from 'next/navigation';
import { type FormEvent, useEffect, useRef, useState } from 'react';
import { problemWords } from '@/components/lists/ask';
import { Actions } from '@/components/ui/actions';
import { Banner } from '@/components/ui/banner';
import { Button, ButtonLink } from '@/components/ui/button';
import { FileField } from '@/components/ui/file-field';
import { FormGrid } from '@/components/ui/form-grid';
import { ProgressBar } from '@/components/ui/progress-bar';
import { TextArea } from '@/components/ui/text-area';
import { importStartedSchema } from '@/lib/contracts/list-imports';

interface UploadFormProps {
  /** The internal route that takes the file. */
  readonly to: string;
  /** The page of an import, its id to be added. */
  readonly importsHref: string;
  readonly cancelHref: string;
}

interface Sending {
  readonly sent: number;
  readonly size: number;
}

/** Sends a file to a list, with the reason for the revision it becomes, and leads on to the page of its import. */
export function UploadForm({ to, importsHref, cancelHref }: UploadFormProps) {
  const router = useRouter();
  const [file, setFile] = useState<File | null>(null);
  const [sending, setSending] = useState<Sending | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const request = useRef<XMLHttpRequest | null>(null);
  useEffect(() => () => request.current?.abort(), []);

  const send = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (file === null) return;
    const reason = String(new FormData(event.currentTarget).get('reason') ?? '');
    setFailure(null);
    setSending({ sent: 0, size: file.size });
    const started = sendFile(`${to}?${new URLSearchParams({ reason }).toString()}`, file, (sent) =>
      setSending({ sent, size: file.size }),
    );
    request.current = started.request;
    started.answer.then(
      (id) => router.push(`${importsHref}/${id}`),
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
          hint="CSV in UTF-8 with one header row, up to 1 GiB. Commas, semicolons or tabs."
          accept=".csv,.txt,.tsv,text/csv,text/tab-separated-values,text/plain"
          required
          disabled={sending !== null}
          onFile={setFile}
        />
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

/** fetch tells nothing of what has been sent; XMLHttpRequest does. */
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
      const started = importStartedSchema.safeParse(request.response);
      if (request.status === 202 && started.success) resolve(started.data.import);
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
