/// <reference path="../.astro/types.d.ts" />

declare namespace App {
  interface Locals {
    /** Names this request in the log and in the x-request-id header. */
    requestId: string;
    /** Who is signed in; null for everyone else. */
    user: import('./features/accounts/guard.server').User | null;
    /** How and when they signed in; null when nobody is. */
    signIn: import('./features/accounts/session.server').SignIn | null;
  }
}
