import { setFlagsFromString } from 'node:v8';
import { runInNewContext } from 'node:vm';
import { expect, it } from 'vitest';
import { readMassList } from '@/lib/ingest/mass-list';
import { declare, utf8 } from './support';

const ROWS = 200_000;

setFlagsFromString('--expose-gc');
const collect = runInNewContext('gc') as () => void;

function heap(): number {
  collect();
  return process.memoryUsage().heapUsed;
}

it('holds no rows of a list of 200,000: only item names stay, at most 150 bytes a row', async () => {
  const note = 'a note of some length that every row of this list carries; '.repeat(4);
  async function* file(): AsyncGenerator<Uint8Array> {
    yield utf8('item,description,group,mass,x,y,z,ixx,note\n');
    for (let row = 0; row < ROWS; row += 500) {
      let text = '';
      for (let at = row; at < row + 500; at += 1) {
        text += `DUNLIN-40-PART-${at},"Rib, no ${at}",Wing/Ribs,1.5,${at % 20},0.25,-1,0.02,${note}\n`;
      }
      yield utf8(text);
    }
  }
  const before = heap();
  let seen = 0;
  let nearTheEnd = 0;
  const reading = await readMassList(file(), declare(), {
    onComponent() {
      seen += 1;
      if (seen === ROWS - 1000) nearTheEnd = heap();
    },
  });
  expect(reading).toMatchObject({ rows: ROWS, problems: [] });
  expect(seen).toBe(ROWS);
  expect(nearTheEnd - before).toBeLessThan(150 * ROWS);
}, 60_000);
