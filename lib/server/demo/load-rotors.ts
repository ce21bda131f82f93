import { Readable } from 'node:stream';
import { type DemoProgram } from '@/fixtures/demo/program';
import { readRotors } from '@/lib/ingest/rotors';
import { reviseRotors } from '@/lib/server/rotors/revise-rotors';
import { storeStream } from '@/lib/server/storage/store-stream';
import { radiansPerSecond } from '@/lib/units/convert';
import { type DemoServices } from './load-demo';
import { type DemoPeople, personOf } from './load-people';

export async function loadRotors(
  { db }: DemoServices,
  { rotatingParts }: DemoProgram,
  program: { readonly id: string },
  people: DemoPeople,
): Promise<void> {
  const bytes = Buffer.from(rotatingParts.csv);
  const { rotors, problems } = await readRotors(Readable.from([bytes]), {
    inertiaUnit: rotatingParts.inertiaUnit,
  });
  if (problems.length > 0) throw new Error(problems.map((problem) => problem.message).join('\n'));
  const { sha256 } = await storeStream(Readable.from([bytes]), { contentLength: bytes.length });
  await reviseRotors(db, {
    person: personOf(people, rotatingParts.by),
    programId: program.id,
    reason: rotatingParts.reason,
    base: 0,
    rotors,
    points: rotatingParts.points.map((point) => ({
      code: point.code,
      title: point.title,
      speeds: point.speeds.map(({ shaft, rpm, sigmaRpm }) => ({
        shaft,
        speed: radiansPerSecond(rpm),
        sigma: sigmaRpm === null ? null : radiansPerSecond(sigmaRpm),
      })),
    })),
    file: { sha256, bytes: bytes.length, name: rotatingParts.fileName },
  });
}
