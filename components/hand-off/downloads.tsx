import { ButtonLink } from '@/components/ui/button';
import { type BaselineState } from '@/lib/baselines/states';

/** Addresses of a baseline's files for the browser. */
export function downloadPath(program: string, number: number, form: 'document' | 'conditions'): string {
  return `/api/internal/programs/${program}/baselines/${number}/${form}`;
}

interface DownloadsProps {
  readonly program: string;
  readonly number: number;
  readonly state: BaselineState;
}

/** The files of one baseline, in both systems of units. */
export function Downloads({ program, number, state }: DownloadsProps) {
  const document = downloadPath(program, number, 'document');
  const conditions = downloadPath(program, number, 'conditions');
  return (
    <div className="grid gap-4">
      <Form
        words="The whole document as the API answers it: conditions, tensors, rotors, findings, sources."
        title="JSON"
        path={document}
      />
      <Form
        words="One row per condition with mass, CG and inertia; the units stand in the column names."
        title="CSV"
        path={conditions}
      />
      {state === 'current' ? null : (
        <p className="measure">{`The files say that baseline ${number} is ${state}, and so do their names.`}</p>
      )}
    </div>
  );
}

function Form({
  title,
  words,
  path,
}: {
  readonly title: string;
  readonly words: string;
  readonly path: string;
}) {
  return (
    <div className="grid gap-2">
      <p className="measure">{words}</p>
      <div className="flex flex-wrap gap-3">
        <ButtonLink href={path} download>
          {`Download ${title}, SI`}
        </ButtonLink>
        <ButtonLink href={`${path}?units=us`} download>
          {`Download ${title}, US units`}
        </ButtonLink>
      </div>
    </div>
  );
}
