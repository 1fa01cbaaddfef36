import { Passport } from 'passport';
import { Strategy } from 'passport-local';
import type { Caller } from '../../platform/http';
import type { PeopleService } from '../people';
import type { Throttle } from './throttle';

/** Sign-in by mail address and password, throttled; a session names the person, who is read again at every request. */
export function createPassport(people: PeopleService, throttle: Throttle) {
  const passport = new Passport();
  passport.use(
    new Strategy({ usernameField: 'email', passReqToCallback: true }, (request, email, password, done) => {
      const address = request.ip ?? '';
      const verify = async () => {
        await throttle.admit('sign-in', email, address);
        const person = await people.verify(email, password);
        if (person) await throttle.forget('sign-in', email, address);
        else await throttle.failed('sign-in', email, address);
        return person;
      };
      verify().then((person) => done(null, person ?? false), done);
    }),
  );
  passport.serializeUser((user, done) => done(null, (user as Caller).id));
  passport.deserializeUser((id: string, done) => {
    people.byId(id).then((person) => done(null, person?.active ? callerFrom(person) : false), done);
  });
  return passport;
}

function callerFrom({ id, name, email, roles }: Caller): Caller {
  return { id, name, email, roles };
}
