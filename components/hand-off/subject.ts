import { type HandoffDocument } from '@/lib/baselines/handoff-document';
import { type BaselineState } from '@/lib/baselines/states';
import { type Moments } from '@/lib/frames/products';
import { type CurlSubject } from './curl-lines';

interface Shown {
  readonly document: HandoffDocument;
  readonly baseline: { readonly number: number; readonly state: BaselineState };
}

/** What the lines ask for. */
export function curlSubject({ document, baseline }: Shown, appUrl: string): CurlSubject {
  return {
    appUrl,
    program: document.program,
    build: document.build,
    number: baseline.number,
    isCurrent: baseline.state === 'current',
    conditions: document.conditions.map(({ code }) => code),
    points: document.operatingPoints.map(({ code }) => code),
  };
}

/** The first condition that has moments, for a number to check one's reading by. */
export function signExample({ conditions }: HandoffDocument): { condition: string; moments: Moments } | null {
  for (const condition of conditions)
    if ('inertia' in condition && condition.inertia !== undefined)
      return { condition: condition.code, moments: condition.inertia };
  return null;
}
