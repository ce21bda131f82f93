import { Day } from '@/components/ui/day';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';

interface ConfigurationLine {
  readonly code: string;
  readonly title: string;
  readonly version: number;
  readonly build_title: string;
  readonly rolled_up_at: Date | null;
  readonly rolled_up_version: number | null;
}

interface ConfigurationTableProps {
  readonly configurations: readonly ConfigurationLine[];
  /** Address of the station. */
  readonly home: string;
}

/** The configurations of a program, newest first, and whether each has been rolled up as it stands. */
export function ConfigurationTable({ configurations, home }: ConfigurationTableProps) {
  return (
    <Table caption="Configurations" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Configuration</ColumnHead>
          <ColumnHead>Code</ColumnHead>
          <ColumnHead>Build</ColumnHead>
          <ColumnHead>Rolled up</ColumnHead>
          <ColumnHead>State</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {configurations.map((one) => (
          <tr key={one.code}>
            <RowHead>
              <TextLink href={`${home}/${one.code}`}>{one.title}</TextLink>
            </RowHead>
            <Cell>
              <code>{one.code}</code>
            </Cell>
            <Cell>{one.build_title}</Cell>
            <Cell>{one.rolled_up_at ? <Day at={one.rolled_up_at} time /> : 'never'}</Cell>
            <Cell>
              <State line={one} />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function State({ line }: { readonly line: ConfigurationLine }) {
  if (line.rolled_up_version === line.version) return <>Rolled up as it stands</>;
  return (
    <span className="font-semibold text-caution">
      {line.rolled_up_version === null ? 'To roll up' : 'Changed since, to roll up'}
    </span>
  );
}
