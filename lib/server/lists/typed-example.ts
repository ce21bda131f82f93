import { type ListDeclarations } from '@/lib/mass/declarations';
import { asTyped } from '@/lib/units/convert';

/** A row's place as its list states it. */
export function typedExample(
  row: {
    readonly item: string;
    readonly x: number;
    readonly y: number;
    readonly z: number;
    readonly pair: boolean;
  },
  { lengthUnit }: Pick<ListDeclarations, 'lengthUnit'>,
) {
  const { item, x, y, z, pair } = row;
  const place = [asTyped(x, lengthUnit), asTyped(y, lengthUnit), asTyped(z, lengthUnit)] as const;
  return { item, place, pair };
}
