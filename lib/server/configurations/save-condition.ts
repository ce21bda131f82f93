import { type Db } from '@/db/client';
import { AppError } from '@/lib/errors';
import { type Category } from '@/lib/mass/component';
import { newId } from '@/lib/server/ids';
import { changeConfiguration, type ConfigurationChange } from './change-configuration';

export interface ConditionContent {
  readonly code: string;
  readonly title: string;
  readonly categories: readonly Category[];
  /** kg, and the place in airframe components in m. */
  readonly items: readonly {
    readonly name: string;
    readonly category: Category;
    readonly mass: number;
    readonly place: readonly [number, number, number];
  }[];
}

/** Adds a condition to a configuration, or replaces the one with the same code. */
export async function saveCondition(
  db: Db,
  input: Omit<ConfigurationChange, 'what'> & { readonly condition: ConditionContent },
): Promise<number> {
  const { configuration, condition } = input;
  return changeConfiguration(db, { ...input, what: `condition ${condition.code}` }, async (trx) => {
    const known = await trx
      .selectFrom('conditions')
      .select(['id', 'code', 'position'])
      .where('configuration_id', '=', configuration.id)
      .execute();
    const same = known.find((one) => one.code === condition.code);
    const id = same?.id ?? newId();
    if (same) {
      await trx
        .updateTable('conditions')
        .set({ title: condition.title, categories: [...condition.categories] })
        .where('id', '=', id)
        .execute();
      await trx.deleteFrom('condition_items').where('condition_id', '=', id).execute();
    } else {
      await trx
        .insertInto('conditions')
        .values({
          id,
          configuration_id: configuration.id,
          code: condition.code,
          title: condition.title,
          categories: [...condition.categories],
          position: Math.max(0, ...known.map((one) => one.position)) + 1,
        })
        .execute();
    }
    if (condition.items.length === 0) return;
    await trx
      .insertInto('condition_items')
      .values(
        condition.items.map((item, index) => ({
          condition_id: id,
          position: index + 1,
          name: item.name,
          category: item.category,
          mass: item.mass,
          place: [...item.place],
        })),
      )
      .execute();
  });
}

/** Takes a condition out of a configuration. @throws AppError conflict for the last one. */
export async function removeCondition(
  db: Db,
  input: Omit<ConfigurationChange, 'what'> & { readonly code: string },
): Promise<number> {
  const { configuration, code } = input;
  return changeConfiguration(db, { ...input, what: `condition ${code} removed` }, async (trx) => {
    const known = await trx
      .selectFrom('conditions')
      .select(['id', 'code'])
      .where('configuration_id', '=', configuration.id)
      .execute();
    const gone = known.find((one) => one.code === code);
    if (gone === undefined) throw new AppError('not-found', `There is no condition "${code}" here.`);
    if (known.length === 1)
      throw new AppError('conflict', 'A configuration keeps at least one condition. Add another one first.');
    await trx.deleteFrom('conditions').where('id', '=', gone.id).execute();
  });
}
