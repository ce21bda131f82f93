export interface CurlSubject {
  /** Where the application is, without a slash at the end. */
  readonly appUrl: string;
  readonly program: string;
  readonly build: string;
  readonly number: number;
  /** The current baseline of its build; a later one must not be mistaken for it. */
  readonly isCurrent: boolean;
  /** Codes. */
  readonly conditions: readonly string[];
  readonly points: readonly string[];
}

export interface CurlLine {
  readonly does: string;
  readonly line: string;
}

/** Sets the variable that the other lines read. */
export const tokenLine = (token: string): string => `export TOKEN='${token}'`;

/** Lines for a POSIX shell that work as they stand once TOKEN is set; files are written where they are run. */
export function curlLines(subject: CurlSubject): readonly CurlLine[] {
  const { number, isCurrent, build, program } = subject;
  const [condition] = subject.conditions;
  const [point] = subject.points;
  const file = `${program}-baseline-${number}`;
  const name = `${program}-${build}`;
  const at = (path: string) => curl(subject, `${number}${path}`);
  return [
    ...(isCurrent ? [currentLine(subject)] : []),
    { does: `Baseline ${number}, by its number`, line: `${at('')} -o ${file}.json` },
    ...(isCurrent
      ? [
          {
            does: 'The current baseline again, only if it has changed since',
            line:
              `${curl(subject, `current?build=${segment(build)}`)} --etag-save ${name}.etag ` +
              `--etag-compare ${name}.etag -o ${name}.json`,
          },
        ]
      : []),
    { does: 'One row per condition', line: `${at('.csv')} -o ${file}.csv` },
    ...(condition === undefined
      ? []
      : [
          {
            does: `Condition ${condition} in lb, in and slug.ft2`,
            line: at(`/conditions/${segment(condition)}?units=us`),
          },
        ]),
    ...(point === undefined
      ? []
      : [
          {
            does: `Angular momentum at ${point}`,
            line: at(`/angular-momentum?point=${segment(point)}`),
          },
        ]),
  ];
}

/** The current baseline of the build, whichever number it then has. */
export function currentLine(subject: CurlSubject): CurlLine {
  const { build, program } = subject;
  return {
    does: `The current baseline of ${build}; fails while the newest is withdrawn`,
    line: `${curl(subject, `current?build=${segment(build)}`)} -o ${program}-${build}.json`,
  };
}

/** `-f`: a refusal ends with an error and writes no file. */
function curl({ appUrl, program }: CurlSubject, path: string): string {
  const url = `${appUrl}/api/v1/programs/${segment(program)}/baselines/${path}`;
  return `curl -sSf -H "Authorization: Bearer $TOKEN" '${url}'`;
}

/** Also safe inside single quotes of a shell. */
const segment = (text: string): string => encodeURIComponent(text).replaceAll("'", '%27');
