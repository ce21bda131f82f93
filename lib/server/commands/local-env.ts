import { existsSync } from 'node:fs';
import { LOCAL_ENV } from './local/places.mjs';

/**
 * Lets a command on this machine find the services that a running `npm start` has: puts their settings into
 * process.env. Settings of the user's own win: with DATABASE_URL set this does nothing. Throws if there are neither.
 */
export function findLocalServices(): void {
  if (process.env['DATABASE_URL']) return;
  if (!existsSync(LOCAL_ENV)) {
    throw new Error(
      'No services to talk to: run npm start in another terminal, or set DATABASE_URL and the others.',
    );
  }
  process.loadEnvFile(LOCAL_ENV);
}
