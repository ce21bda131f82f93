'use client';

import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { ask } from '@/components/lists/ask';
import { ProblemTable } from '@/components/lists/problem-table';
import { Actions } from '@/components/ui/actions';
import { Banner } from '@/components/ui/banner';
import { Button, ButtonLink } from '@/components/ui/button';
import { FileField } from '@/components/ui/file-field';
import { FormGrid } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';
import { TextArea } from '@/components/ui/text-area';
import { type RotorFileAnswer, rotorFileAnswerSchema } from '@/lib/contracts/rotors';
import { unitLabel } from '@/lib/units/names';
import { INERTIA_UNITS } from '@/lib/units/table';

interface RotorUploadProps {
  /** The internal route that takes the file. */
  readonly to: string;
  readonly content: 'rotors' | 'points';
  readonly base: number;
  /** The station's page. */
  readonly backHref: string;
}

/** Sends a file of rotating parts or operating points; shows its problems, or goes to the revision that it became. */
export function RotorUpload({ to, content, base, backHref }: RotorUploadProps) {
  const router = useRouter();
  const [file, setFile] = useState<File | null>(null);
  const [sending, setSending] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const [answer, setAnswer] = useState<RotorFileAnswer | null>(null);

  const send = async (form: FormData) => {
    if (file === null) return;
    const query = new URLSearchParams({
      content,
      base: String(base),
      reason: String(form.get('reason') ?? ''),
    });
    const unit = form.get('inertia_unit');
    if (typeof unit === 'string') query.set('inertia_unit', unit);
    setSending(true);
    setFailure(null);
    setAnswer(null);
    try {
      const said = await ask(`${to}?${query.toString()}`, rotorFileAnswerSchema, {
        method: 'POST',
        headers: { 'Content-Type': 'text/csv', 'X-File-Name': encodeURIComponent(file.name) },
        body: file,
      });
      setAnswer(said);
      if (said.status === 'revised') router.refresh();
    } catch (error) {
      setFailure(error instanceof Error ? error.message : String(error));
    } finally {
      setSending(false);
    }
  };

  return (
    <div className="grid min-w-0 gap-8">
      {answer?.status === 'revised' ? (
        <Banner
          severity="done"
          live
          title={`Revision ${answer.revision} is in force: ${answer.count} ${content === 'rotors' ? 'rotors' : 'operating points'}.`}
          action={<ButtonLink href={backHref}>{`See revision ${answer.revision}`}</ButtonLink>}
        >
          {answer.unread.length > 0 ? <p>Columns that were not read: {answer.unread.join(', ')}.</p> : null}
        </Banner>
      ) : null}
      <form
        onSubmit={(event: FormEvent<HTMLFormElement>) => {
          event.preventDefault();
          void send(new FormData(event.currentTarget));
        }}
      >
        <FormGrid>
          {failure === null ? null : (
            <Banner severity="blocker" word="Failed" live title="Nothing was saved">
              <p>{failure}</p>
            </Banner>
          )}
          <FileField
            name="file"
            label="File"
            hint={
              content === 'rotors'
                ? 'CSV with rotor, polar_inertia, sense, and axis_x, axis_y, axis_z or axis_yaw, axis_pitch; up to 8 MiB.'
                : 'CSV with point, shaft, rpm, and if you like title and rpm_sigma: a row for each shaft at each point; up to 8 MiB.'
            }
            accept=".csv,.txt,.tsv,text/csv,text/tab-separated-values,text/plain"
            required
            disabled={sending}
            onFile={setFile}
          />
          {content === 'rotors' ? (
            <SelectField
              name="inertia_unit"
              label="Unit of the inertias in the file"
              placeholder="Choose a unit"
              required
              options={INERTIA_UNITS.map((unit) => ({ value: unit, label: unitLabel(unit) }))}
            />
          ) : null}
          <TextArea
            name="reason"
            label="Reason for this revision"
            hint={
              content === 'rotors'
                ? 'The file replaces all rotors; the operating points stay.'
                : 'The file replaces all operating points; the rotors stay.'
            }
            rows={3}
            maxLength={1000}
            required
          />
          <Actions>
            <Button kind="primary" type="submit" disabled={sending} aria-busy={sending}>
              {sending ? 'Reading the file' : 'Upload file'}
            </Button>
            <ButtonLink href={backHref} kind="quiet">
              Leave without uploading
            </ButtonLink>
          </Actions>
        </FormGrid>
      </form>
      {answer?.status === 'problems' ? (
        <div className="grid gap-4">
          <Banner
            severity="blocker"
            word="Refused"
            live
            title={`The file has ${answer.total === 1 ? '1 problem' : `${answer.total} problems`}.`}
          >
            <p>
              {base === 0
                ? 'Nothing was saved. Fix them in the file and upload it again.'
                : `Nothing was saved: revision ${base} stays in force. Fix them in the file and upload it again.`}
              {answer.total > answer.problems.length ? ` The first ${answer.problems.length} are shown.` : ''}
            </p>
          </Banner>
          <ProblemTable problems={answer.problems} />
        </div>
      ) : null}
    </div>
  );
}
