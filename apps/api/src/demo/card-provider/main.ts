import { z } from 'zod';
import { openCardProvider } from './server';

const Settings = z.object({
  CARD_PROVIDER_PORT: z.coerce.number().int().min(1).max(65_535),
  CARD_PROVIDER_FILE: z.string(),
  STRIPE_SECRET_KEY: z.string(),
  STRIPE_WEBHOOK_SECRET: z.string(),
  WEBHOOK_URL: z.url(),
});

const settings = Settings.parse(process.env);
const provider = await openCardProvider({
  key: settings.STRIPE_SECRET_KEY,
  webhookSecret: settings.STRIPE_WEBHOOK_SECRET,
  webhookUrl: settings.WEBHOOK_URL,
  file: settings.CARD_PROVIDER_FILE,
  port: settings.CARD_PROVIDER_PORT,
});
for (const signal of ['SIGTERM', 'SIGINT'] as const)
  process.on(signal, () => void provider.close().then(() => process.exit(0)));
