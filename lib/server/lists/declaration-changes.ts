import { declarationsToBody } from '@/lib/contracts/list-declarations';
import { type ListDeclarations } from '@/lib/mass/declarations';

export interface DeclarationChange {
  /** As in the contract, e.g. `mass_unit`. */
  readonly name: string;
  readonly before: string;
  readonly after: string;
}

/** The declarations that differ between two revisions, as a person wrote them. */
export function declarationChanges(before: ListDeclarations, after: ListDeclarations): DeclarationChange[] {
  const [old, now] = [told(before), told(after)];
  return [...now.keys()].flatMap((name) => {
    const [was, is] = [old.get(name) ?? '', now.get(name) ?? ''];
    return was === is ? [] : [{ name, before: was, after: is }];
  });
}

function told(declarations: ListDeclarations): Map<string, string> {
  const { frame, axes, marking, ...rest } = declarationsToBody(declarations);
  return new Map([
    ...Object.entries(rest),
    ['axes', axes.join(', ')],
    ['frame origin', `${frame.origin.x}, ${frame.origin.y}, ${frame.origin.z}`],
    ['frame yaw, pitch, roll', `${frame.yaw}, ${frame.pitch}, ${frame.roll}`],
    ['marking', marking ?? 'none'],
  ]);
}
