import { performance } from 'node:perf_hooks';
import { expect, it } from 'vitest';
import { hashPassword, verifyPassword } from '@/lib/server/auth/password';

it('hashes with argon2id at the cost that the OWASP Password Storage Cheat Sheet names (19 MiB, t=2, p=1)', async () => {
  expect(await hashPassword('correct horse battery')).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
});

it('knows the password again and no other', async () => {
  const hash = await hashPassword('correct horse battery');
  expect(await verifyPassword(hash, 'correct horse battery')).toBe(true);
  expect(await verifyPassword(hash, 'correct horse batterY')).toBe(false);
});

it('takes as long for nobody as for somebody', async () => {
  const hash = await hashPassword('correct horse battery');
  await verifyPassword(null, 'warm up');
  const took = async (against: string | null): Promise<number> => {
    const from = performance.now();
    expect(await verifyPassword(against, 'wrong')).toBe(false);
    return performance.now() - from;
  };
  let somebody = 0;
  let nobody = 0;
  // In turns, so that whatever else the machine does slows both.
  for (let i = 0; i < 6; i += 1) {
    somebody += await took(hash);
    nobody += await took(null);
  }
  expect(nobody).toBeGreaterThan(somebody / 3);
  expect(nobody).toBeLessThan(somebody * 3);
});

it('lets a crowd wait in line and turns away who comes when the line is full', async () => {
  const crowd = await Promise.allSettled(Array.from({ length: 80 }, () => verifyPassword(null, 'x')));
  const away = crowd.filter((one) => one.status === 'rejected');
  expect(away).toHaveLength(80 - 66);
  for (const one of away) expect(one.reason).toMatchObject({ code: 'unavailable', retryAfter: 5 });
  expect(await verifyPassword(null, 'x')).toBe(false);
});
