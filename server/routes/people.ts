import { Router } from 'express';
import {
  invitationJsonSchema,
  labInputSchema,
  labJsonSchema,
  personInputSchema,
  personJsonSchema,
  personUpdateSchema,
} from '@shared/schemas/account';
import { pathIdSchema } from '@shared/schemas/identity';
import { labPolicy, personPolicy } from '@shared/policies/lab';
import { z } from 'zod';
import { authorize } from '../authorize';
import { endpoint } from '../endpoint';
import { conflict, notFound, stale } from '../errors';
import { Lab } from '../models/Lab';
import { Person } from '../models/Person';
import { Session } from '../models/Session';
import { presentLab, presentPerson } from '../presenters/account';
import { invitePerson, issueInvitation, type Invited } from '../services/invitePerson';
import type { Context } from '../context';

const personPath = z.strictObject({ personId: pathIdSchema });

const presentInvited = ({ person, address, expiresAt }: Invited) => ({
  person: presentPerson(person),
  address,
  expiresAt: expiresAt.toISOString(),
});

async function findPerson(personId: number, { actor, transaction }: Context): Promise<Person> {
  const person = await Person.findOne({
    where: { id: personId, labId: actor.labId },
    transaction,
    lock: true,
  });
  if (!person) throw notFound('person');
  return person;
}

/** A lab without an admin could never get one again. */
async function keepAnAdmin(leaving: Person, { actor, transaction }: Context): Promise<void> {
  const people = await Person.findAll({
    where: { labId: actor.labId, isActive: true },
    transaction,
  });
  const others = people.filter(({ id, roles }) => id !== leaving.id && roles.includes('admin'));
  if (others.length === 0)
    throw conflict('last-admin', 'This is the lab’s last admin. Make somebody else admin first.');
}

export const peopleRouter = Router();

endpoint(peopleRouter, {
  method: 'get',
  path: '/people',
  summary: 'The people of the lab',
  access: 'signedIn',
  answer: z.array(personJsonSchema),
  async handle({ ctx }) {
    authorize(personPolicy.read, ctx.actor, undefined);
    const people = await Person.findAll({
      where: { labId: ctx.actor.labId },
      order: [['name', 'ASC']],
      transaction: ctx.transaction,
    });
    return people.map(presentPerson);
  },
});

endpoint(peopleRouter, {
  method: 'post',
  path: '/people',
  summary: 'Add a person; answers the one-time address at which they choose a password',
  access: 'signedIn',
  isCreate: true,
  status: 201,
  body: personInputSchema,
  answer: invitationJsonSchema,
  async handle({ ctx, body }) {
    authorize(personPolicy.invite, ctx.actor, undefined);
    return presentInvited(await invitePerson(body, ctx));
  },
});

endpoint(peopleRouter, {
  method: 'post',
  path: '/people/:personId/invitation',
  summary: 'A new one-time address for a person; older ones stop working',
  access: 'signedIn',
  params: personPath,
  answer: invitationJsonSchema,
  async handle({ ctx, params }) {
    authorize(personPolicy.invite, ctx.actor, undefined);
    return presentInvited(await issueInvitation(await findPerson(params.personId, ctx), ctx));
  },
});

endpoint(peopleRouter, {
  method: 'put',
  path: '/people/:personId',
  summary: 'Change a person’s roles, or archive them; their sessions end',
  access: 'signedIn',
  params: personPath,
  body: personUpdateSchema,
  answer: personJsonSchema,
  async handle({ ctx, params, body }) {
    authorize(personPolicy.change, ctx.actor, undefined);
    const person = await findPerson(params.personId, ctx);
    if (person.version !== body.version) throw stale(presentPerson(person));
    if (body.roles.includes('customer') !== person.roles.includes('customer'))
      throw conflict(
        'customer-role',
        'A customer stays a customer: invite the person anew for other work.',
      );
    if (person.roles.includes('admin') && !(body.isActive && body.roles.includes('admin')))
      await keepAnAdmin(person, ctx);
    await person.update({ roles: body.roles, isActive: body.isActive }, ctx);
    await Session.update(
      { revokedAt: new Date() },
      { where: { personId: person.id, revokedAt: null }, transaction: ctx.transaction },
    );
    return presentPerson(person);
  },
});

endpoint(peopleRouter, {
  method: 'get',
  path: '/lab',
  summary: 'The lab and its rules',
  access: 'signedIn',
  answer: labJsonSchema,
  async handle({ ctx }) {
    authorize(labPolicy.read, ctx.actor, undefined);
    return presentLab(
      await Lab.findByPk(ctx.actor.labId, { transaction: ctx.transaction, rejectOnEmpty: true }),
    );
  },
});

endpoint(peopleRouter, {
  method: 'put',
  path: '/lab',
  summary: 'Change the rules of the lab',
  access: 'signedIn',
  body: labInputSchema,
  answer: labJsonSchema,
  async handle({ ctx, body }) {
    authorize(labPolicy.change, ctx.actor, undefined);
    const lab = await Lab.findByPk(ctx.actor.labId, {
      transaction: ctx.transaction,
      lock: true,
      rejectOnEmpty: true,
    });
    if (lab.version !== body.version) throw stale(presentLab(lab));
    await lab.update({ twoPersonRule: body.twoPersonRule }, ctx);
    return presentLab(lab);
  },
});
