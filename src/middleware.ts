import { randomUUID } from 'node:crypto';
import type { APIContext, MiddlewareHandler } from 'astro';
import { config } from '@/config.server';
import { accessTo, includesRole, type Access } from '@/features/accounts/access';
import { isAtThisMachine, notForThisRole, signInFirst } from '@/features/accounts/guard.server';
import { returnPath } from '@/features/accounts/return-path';
import { readSession } from '@/features/accounts/session.server';
import { insteadOf } from '@/features/editions/withdrawal.server';
import { isFromHere } from '@/features/http/origin';
import { problem } from '@/features/http/problem';

/**
 * Every request, in this order: a name for the log; sent from here, when it changes something; who it is; may they.
 * Pages that are made while building see nobody and ask nothing.
 */
export const onRequest: MiddlewareHandler = async (context, next) => {
  const { locals, url, request } = context;
  locals.requestId = randomUUID().slice(0, 8);
  locals.user = null;
  locals.signIn = null;
  if (context.isPrerendered) return next();

  if (!isFromHere(request, { url, ownOrigins: [url.origin, config.siteUrl] }))
    return finish(context, sentFromElsewhere(context));
  const session = await readSession(context);
  locals.user = session?.user ?? null;
  locals.signIn = session?.signIn ?? null;

  // The error pages stand at the address that failed.
  if (/^\/(404|500)$/.test(context.routePattern)) return finish(context, await next());
  return finish(
    context,
    (await refusal(context, accessTo(url.pathname))) ?? (await elsewhere(context)) ?? (await next()),
  );
};

const isApi = ({ url }: APIContext): boolean => url.pathname === '/api' || url.pathname.startsWith('/api/');

async function refusal(context: APIContext, access: Access | null): Promise<Response | null> {
  const { user } = context.locals;
  if (access === 'all') return null;
  if (access === null || (access === 'this machine' && !isAtThisMachine(context))) return notFound(context);
  if (access === 'this machine') return null;
  if (user && includesRole(user.role, access)) return null;
  if (isApi(context)) return user ? notForThisRole(access) : signInFirst();
  if (user) return context.rewrite('/sign-in/refused');
  const to = returnPath(context.url.pathname + context.url.search);
  return new Response(null, { status: 303, headers: { location: `/sign-in?${new URLSearchParams({ to })}` } });
}

/** Projects that moved or were withdrawn, whichever of their addresses is asked for. */
async function elsewhere({ url, rewrite }: APIContext): Promise<Response | null> {
  const instead = insteadOf(url);
  if (instead === null) return null;
  return 'moved' in instead
    ? new Response(null, { status: 301, headers: { location: instead.moved, 'cache-control': 'no-cache' } })
    : rewrite(instead.shown);
}

/** Without a body Astro shows the site's own page for it. */
const notFound = (context: APIContext): Response =>
  isApi(context)
    ? problem(404, 'Not found', { detail: 'Nothing is at this address.', code: 'not-found' })
    : new Response(null, { status: 404 });

function sentFromElsewhere(context: APIContext): Response {
  const detail = 'This was not sent from a page of this site, so it was not done. Open the page here and try again.';
  if (isApi(context)) return problem(403, 'Sent from elsewhere', { detail, code: 'other-origin' });
  return new Response(`${detail}\n`, { status: 403, headers: { 'content-type': 'text/plain; charset=utf-8' } });
}

/** Names the request, and keeps what a signed-in person sees out of every cache. */
function finish({ locals }: APIContext, response: Response): Response {
  // Some responses cannot be changed: a new one round the same body can.
  const named = new Response(response.body, response);
  named.headers.set('x-request-id', locals.requestId);
  if (locals.user && !named.headers.has('cache-control')) named.headers.set('cache-control', 'private, no-store');
  return named;
}
