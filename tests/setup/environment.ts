import { mkdtempSync } from 'node:fs';
import { join } from 'node:path';
import { inject } from 'vitest';

// Before anything reads the settings: no test touches the real data folder, sends mail or knows a real secret.
process.env.DATA_DIR = mkdtempSync(join(inject('temporaryFolder'), 'data-'));
process.env.AUTH_SECRET = 'a secret for tests alone, 32 or more';
process.env.PORT = '4321';
for (const name of ['SITE_URL', 'HOST', 'SMTP_URL', 'MAIL_FROM', 'ALLOWED_HOSTS', 'TRUST_PROXY', 'DEMO'])
  delete process.env[name];
