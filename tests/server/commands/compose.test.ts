import { readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { z } from 'zod';
import { externalSettings } from '@/lib/server/commands/local/external.mjs';
import { readEnv } from '@/lib/server/env';

const TEXT = readFileSync(path.join(import.meta.dirname, '../../../docker-compose.yml'), 'utf8');

// Compose Specification (compose-spec.io), the parts in use here: services, volumes, configs, depends_on conditions.
const compose = z
  .object({
    name: z.string(),
    services: z.record(
      z.string(),
      z.looseObject({
        image: z.string(),
        environment: z.record(z.string(), z.string()).optional(),
        ports: z.array(z.string()).optional(),
        volumes: z.array(z.string()).optional(),
        depends_on: z
          .record(
            z.string(),
            z.object({
              condition: z.enum(['service_healthy', 'service_started', 'service_completed_successfully']),
            }),
          )
          .optional(),
        healthcheck: z.looseObject({ test: z.array(z.string()) }).optional(),
        configs: z.array(z.looseObject({ source: z.string(), target: z.string() })).optional(),
      }),
    ),
    volumes: z.record(z.string(), z.unknown()),
    configs: z.record(z.string(), z.object({ content: z.string() })),
  })
  .loose();

const deployment = compose.parse(parse(TEXT, { merge: true }));

/** A value as compose fills it in, with something for every variable. */
const filled = (value: string): string =>
  value.replace(/(?<!\$)\$\{(\w+)(?::([?-])[^}]*)?\}/g, (_, name: string, kind?: string) =>
    kind === '-' ? '' : name === 'APP_URL' ? 'https://polhode.example' : `a-${name.toLowerCase()}`,
  );

describe('docker-compose.yml', () => {
  it('is a composition of PostgreSQL, a store, a relay and the application, whose parts are all declared', () => {
    expect(Object.keys(deployment.services).sort()).toEqual(['postgres', 'relay', 'store', 'web']);
    for (const service of Object.values(deployment.services)) {
      for (const name of Object.keys(service.depends_on ?? {}))
        expect(deployment.services).toHaveProperty(name);
      for (const { source } of service.configs ?? []) expect(deployment.configs).toHaveProperty(source);
      for (const volume of service.volumes ?? []) {
        const [source = ''] = volume.split(':');
        if (!source.startsWith('.')) expect(deployment.volumes).toHaveProperty(source);
      }
    }
  });

  it('gives the application every setting that it asks for', () => {
    const settings = Object.fromEntries(
      Object.entries(deployment.services['web']?.environment ?? {}).map(([name, value]) => [
        name,
        filled(value),
      ]),
    );
    expect(readEnv(settings).APP_URL).toBe('https://polhode.example');
    expect(externalSettings(settings)).not.toBeNull();
  });

  it('carries no secret of its own: each comes from the environment and has no default', () => {
    const secrets = [...TEXT.matchAll(/\$\{(\w*(?:PASSWORD|SECRET|KEY)\w*)([^}]*)\}/g)];
    expect(secrets.length).toBeGreaterThan(4);
    for (const [, name, rest] of secrets) expect(`${name}${rest}`).not.toMatch(/:-./);
  });

  it('opens no port to the outside but the application on loopback, where a proxy with TLS stands before it', () => {
    const ports = Object.entries(deployment.services).flatMap(([name, service]) =>
      (service.ports ?? []).map((port) => `${name} ${port}`),
    );
    expect(ports).toEqual(['web 127.0.0.1:3000:3000']);
  });
});
