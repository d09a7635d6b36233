import { Router, type Request } from 'express';
import passport from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import { type PersonActor } from '../http/actor';
import { mount } from '../http/mount';
import { sessionCookieName } from '../http/sessions';
import { knownMachineCookie, knownMachineDays, type knownMachines } from './known-machines';
import { type SessionService } from './session-service';

type KnownMachines = ReturnType<typeof knownMachines>;

interface Remembered {
  organisationId: string;
  personId: string;
  signedInAt: number;
}

/** Passport wired to the service: how a password becomes a session, and a session a person. */
export function passportFor(service: SessionService, machines: KnownMachines): passport.Authenticator {
  const door = new passport.Passport();
  door.use(
    new LocalStrategy({ usernameField: 'email', passReqToCallback: true }, (request, email, password, done) => {
      service.signIn({ email, password }, request.ip ?? 'unknown', machines.recognise(request.headers.cookie, email)).then((actor) => done(null, { ...actor, signedInAt: Date.now() }), done);
    }),
  );
  door.serializeUser<Remembered>((user, done) => done(null, { organisationId: user.organisationId, personId: user.personId, signedInAt: user.signedInAt }));
  door.deserializeUser<Remembered>((remembered, done) => {
    service.readActor(remembered.organisationId, remembered.personId, remembered.signedInAt).then((actor) => done(null, actor && { ...actor, signedInAt: remembered.signedInAt }), done);
  });
  return door;
}

export function sessionRoutes(service: SessionService, door: passport.Authenticator, machines: KnownMachines, isSecure: boolean): Router {
  const router = Router();
  const remember = (request: Request, actor: PersonActor, signedInAt: number) =>
    // logIn gives the session a new id: one planted before signing in is worth nothing after.
    new Promise<void>((resolve, reject) => request.logIn({ ...actor, signedInAt }, (error: unknown) => (error ? reject(error) : resolve())));

  mount(router, 'signIn', async ({ body, request, response }) => {
    const actor = await new Promise<PersonActor>((resolve, reject) => {
      const answer = (error: unknown, user?: Express.User | false) => (error || !user ? reject(error ?? new Error('no user')) : resolve(user));
      (door.authenticate('local', answer) as (request: unknown, response: unknown, next: (error: unknown) => void) => void)(request, response, reject);
    });
    await remember(request, actor, Date.now());
    response.cookie(knownMachineCookie, machines.remember(request.headers.cookie, body.email), { httpOnly: true, sameSite: 'strict', secure: isSecure, path: '/api/session', maxAge: knownMachineDays * 24 * 3600 * 1000 });
    return service.toSession(actor);
  });
  mount(router, 'readSession', async ({ actor }) => service.toSession(actor));
  mount(router, 'signOut', async ({ request, response }) => {
    await new Promise<void>((resolve, reject) => request.session.destroy((error: unknown) => (error ? reject(error) : resolve())));
    response.clearCookie(sessionCookieName);
    return undefined;
  });
  mount(router, 'keepUnit', async ({ actor, body }) => {
    await service.keepUnit(actor, body);
    return undefined;
  });
  mount(router, 'changePassword', async ({ actor, body, request }) => {
    await remember(request, actor, await service.changePassword(actor, body));
    return undefined;
  });
  return router;
}
