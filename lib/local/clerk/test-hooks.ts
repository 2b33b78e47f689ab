import { z } from 'zod';
import { notFound } from './fault';
import type { Answer, Asked } from './http';
import type { Instance } from './instance';

const whoShape = z
  .object({ user_id: z.string(), email: z.string() })
  .partial()
  .refine(({ user_id, email }) => user_id !== undefined || email !== undefined, 'Name a user.');
const tokenShape = whoShape.and(z.object({ origin: z.url().optional(), expired: z.boolean().optional() }));
const redeliverShape = z.object({ id: z.string() });

const HOUR_SECONDS = 3600;

/**
 * What tests may ask for, with the secret key as bearer. All are POST but the first:
 * `GET /test/events?type=` events so far, oldest first; `/test/token {user_id | email, expired?}` a session token of
 * an hour, `{ jwt }`; `/test/redeliver {id}` an event once more, answering how it was taken; `/test/expire-codes
 * {email}` lets the codes mailed to an address run out; `/test/end-sessions {email}` signs a user out everywhere.
 */
export async function answerTest(instance: Instance, asked: Asked): Promise<Answer> {
  const ok = (body: unknown): Answer => ({ status: 200, body });
  const { state } = instance.store;
  const userOf = (fields: unknown) => {
    const { user_id, email } = whoShape.parse(fields);
    const user = user_id === undefined ? instance.store.userByEmail(email ?? '') : state.users[user_id];
    if (!user) throw notFound('user');
    return user;
  };
  switch (`${asked.method} ${asked.path}`) {
    case 'GET /test/events': {
      const type = asked.query.get('type');
      return ok(state.events.filter((event) => type === null || event.type === type));
    }
    case 'POST /test/token': {
      const { origin, expired } = tokenShape.parse(asked.fields);
      const user = userOf(asked.fields);
      const client = instance.newClient();
      const session = instance.startSession(client, user, origin ?? instance.options.webOrigin);
      instance.store.save();
      return ok({ jwt: instance.tokenOf(session, undefined, expired ? -HOUR_SECONDS : HOUR_SECONDS) });
    }
    case 'POST /test/redeliver': {
      const { id } = redeliverShape.parse(asked.fields);
      const event = state.events.find((one) => one.id === id);
      if (!event) throw notFound('event');
      return ok(await instance.deliveries.deliverOnce(event));
    }
    case 'POST /test/expire-codes': {
      const email = z.object({ email: z.string() }).parse(asked.fields).email.toLowerCase();
      const attempts = [
        ...Object.values(state.signIns).filter((one) => one.identifier?.toLowerCase() === email),
        ...Object.values(state.signUps).filter((one) => one.email === email),
      ];
      for (const { verification } of attempts) if (verification) verification.expireAt = Date.now() - 1;
      instance.store.save();
      return ok({ expired: attempts.length });
    }
    case 'POST /test/end-sessions': {
      instance.endSessions(userOf(asked.fields).id, () => true);
      instance.store.save();
      return ok({});
    }
    default:
      throw notFound(`address for ${asked.method} ${asked.path}`);
  }
}
