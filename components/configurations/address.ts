import { type DriversAsked, driversAsked, withDrivers } from '@/lib/drivers/drivers';
import { type UnitSystem } from '@/lib/units/names';

/** What a reader chose on a configuration's page; kept in its address. */
export interface ConfigurationView {
  readonly condition: string | null;
  readonly units: UnitSystem;
  /** Every level of groups, not only the first. */
  readonly allGroups: boolean;
  readonly point: string | null;
  /** Which of the ten numbers is looked into, and by what parts. */
  readonly drivers: DriversAsked;
}

type Asked = Readonly<Record<string, string | string[] | undefined>>;

export function viewAsked(asked: Asked): ConfigurationView {
  const text = (name: string): string | null => {
    const value = asked[name];
    return typeof value === 'string' ? value : null;
  };
  return {
    condition: text('condition'),
    units: asked['units'] === 'us' ? 'us' : 'si',
    allGroups: asked['groups'] === 'all',
    point: text('point'),
    drivers: driversAsked(asked),
  };
}

/** The page's address with this view; what is as at first leaves no trace. */
export function viewHref(home: string, view: ConfigurationView): string {
  const query = new URLSearchParams();
  if (view.condition !== null) query.set('condition', view.condition);
  if (view.units === 'us') query.set('units', 'us');
  if (view.allGroups) query.set('groups', 'all');
  if (view.point !== null) query.set('point', view.point);
  withDrivers(query, view.drivers);
  return query.size === 0 ? home : `${home}?${query.toString()}`;
}
