import { Router } from 'express';
import { serverOf } from './server';

/** `/health`: the process answers. `/ready`: it can reach its database, so it may be sent work. */
export function health(): Router {
  return Router()
    .get('/health', (_req, res) => void res.json({ status: 'up' }))
    .get('/ready', async (req, res) => {
      try {
        await serverOf(req).source.query('SELECT 1');
        res.json({ status: 'ready' });
      } catch {
        res.status(503).json({ status: 'waiting for the database' });
      }
    });
}
