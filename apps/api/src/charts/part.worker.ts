import { parentPort } from 'node:worker_threads';
import { doFreeParts, type SharedParts } from './part-claims';

parentPort?.on('message', (shared: SharedParts) => doFreeParts(shared, () => undefined));
