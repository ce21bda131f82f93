import { type TenUnits } from '@/components/drivers/number-words';
import { DriversSection } from '@/components/drivers/drivers-section';
import { Section } from '@/components/ui/section';
import { type DriversAsked } from '@/lib/drivers/drivers';
import { serverDb } from '@/lib/server/database';
import { type DriversSource, loadDrivers } from '@/lib/server/drivers/load-drivers';

interface DriversHereProps {
  /** Null where the page has no condition to look into. */
  readonly source: Promise<DriversSource | null>;
  readonly asked: DriversAsked;
  readonly units: TenUnits;
  readonly hrefOf: (asked: DriversAsked) => string;
  readonly listsHref: string;
  readonly of: string;
}

/** Reads rows, so it is rendered after the page, in a Suspense of its own. */
export async function DriversHere({ source, ...props }: DriversHereProps) {
  const found = await source;
  if (found === null) return null;
  const drivers = await loadDrivers(serverDb(), found, props.asked);
  return <DriversSection drivers={drivers} {...props} />;
}

/** Stands there meanwhile. */
export function DriversComing() {
  return (
    <div className="no-print">
      <Section title="What drives it">
        <p role="status" className="text-ink-2">
          Going through the rows.
        </p>
      </Section>
    </div>
  );
}
