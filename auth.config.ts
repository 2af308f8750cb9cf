import { defineConfig } from 'auth-astro';
import { authConfig } from './src/features/accounts/auth.server';

// Not spread: the secret is a getter, read at the first request.
export default defineConfig(authConfig);
