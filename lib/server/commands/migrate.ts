import { findLocalServices } from './local-env';
import { migrate } from './schema';

findLocalServices();
const done = await migrate();
console.log(done.length === 0 ? 'The database is up to date.' : `Ran ${done.join(', ')}.`);
