import { offsetWords } from '@/lib/frames/words';
import { changedPlace } from '@/lib/frames/issue-change';
import { type IssueConversion } from '@/lib/mass/issue-conversion';
import { convertedPercentMac, issueDifferences } from '@/lib/mass/issue-differences';
import { asTyped } from '@/lib/units/convert';
import { type LengthUnit } from '@/lib/units/table';

interface FrameChangeProps {
  /** From the issue before to the one shown. */
  readonly conversion: IssueConversion;
  readonly former: number;
  readonly unit: LengthUnit;
}

/** What of the aircraft's reference geometry an issue kept, and what depends on what it did not. */
export function FrameChange({ conversion, former, unit }: FrameChangeProps) {
  const { change, from, to } = conversion;
  const { isDirectionKept, isDatumKept, isPlaneKept, isChordKept, isBodyKept } = issueDifferences(
    change,
    from,
    to,
  );
  const say = (metres: number): string => `${Number(asTyped(metres, unit).toPrecision(9))} ${unit}`;
  const datum = offsetWords(changedPlace(change, [0, 0, 0]), to.axes, say);
  const quarter = convertedPercentMac(25, change, from, to);
  return (
    <ul className="measure grid gap-1">
      <li>
        {isDatumKept || datum === null
          ? 'The datum is where it was.'
          : `The datum of issue ${former} lies ${datum} of the new one.`}{' '}
        Lists, rotating parts, items on board and reference points of issue {former} are converted; nothing of
        the aircraft moves.
      </li>
      <li>
        {isDirectionKept
          ? 'Forward, right and down are the directions they were.'
          : 'The reference line was laid anew: forward, right and down are other directions of the aircraft.'}
      </li>
      <li>
        {isPlaneKept
          ? 'The plane of symmetry is the plane it was.'
          : `The plane of symmetry is another plane of the aircraft. Pairs and half lists of issue ${former} keep the images they had, and are not carried.`}
      </li>
      <li>
        {isChordKept
          ? 'The mean chord is the stretch it was: limits in % MAC mean what they meant.'
          : `The mean chord is another stretch of the aircraft${
              quarter === null ? '' : `: what was 25 % MAC is ${quarter.toFixed(2)} % of it`
            }. Limits in % MAC are not converted; state them anew.`}
      </li>
      <li>
        {isBodyKept
          ? 'Body axes point as they did.'
          : 'Body axes point elsewhere on the aircraft: moments, products and angular momenta are about other axes. Comparisons with results of the issue before turn them.'}
      </li>
    </ul>
  );
}
