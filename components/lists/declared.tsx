import {
  axesWords,
  EXTENT_WORDS,
  KIND_WORDS,
  poseWords,
  PRODUCT_MEANING,
  PRODUCT_WORDS,
  UNCERTAINTY_WORDS,
  unitWords,
} from '@/components/lists/list-words';
import { DefinitionList } from '@/components/ui/definition-list';
import { type ListDeclarations } from '@/lib/mass/declarations';

/** What a list declares once for all its rows. */
export function Declared({
  declarations,
  issue,
}: {
  readonly declarations: ListDeclarations;
  /** The frame issue that places are stated in. */
  readonly issue: { readonly number: number; readonly title: string };
}) {
  const { products, kind, extent, uncertainty, marking, axes } = declarations;
  return (
    <DefinitionList
      items={[
        { term: 'Units', value: unitWords(declarations) },
        {
          term: 'Products of inertia',
          value: (
            <>
              <strong>{PRODUCT_WORDS[products]}</strong>
              <span className="block text-note text-ink-2">{PRODUCT_MEANING[products]}</span>
            </>
          ),
        },
        { term: 'Axes', value: axesWords(axes) },
        { term: 'Frame', value: poseWords(declarations) },
        { term: 'Frame issue', value: `${issue.number}: ${issue.title}` },
        { term: 'Kind', value: KIND_WORDS[kind] },
        { term: 'Extent', value: EXTENT_WORDS[extent] },
        { term: 'Sigma columns', value: UNCERTAINTY_WORDS[uncertainty] },
        { term: 'Marking', value: marking ?? 'None' },
      ]}
    />
  );
}
