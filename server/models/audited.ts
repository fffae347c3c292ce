import type { Model, ModelStatic, Transaction } from 'sequelize';
import { SYSTEM_ID, type Context } from '../context';
import { AuditEvent } from './AuditEvent';

/** Never written to the trail. */
const SECRET = new Set(['passwordHash', 'updatedAt', 'createdAt']);

type Fields = Record<string, unknown>;

function contextOf(options: unknown, noun: string): Context {
  const ctx = options as Partial<Context> & { transaction?: Transaction };
  if (!ctx.actor || !ctx.transaction || !ctx.requestId)
    throw new Error(`A ${noun} was written without its context: pass ctx as the options.`);
  return ctx as Context;
}

function pick(row: Model, keys: readonly string[], from: 'now' | 'before'): Fields {
  return Object.fromEntries(
    keys
      .filter((key) => !SECRET.has(key))
      .map((key) => [key, from === 'now' ? row.get(key) : row.previous(key as never)]),
  );
}

function studyIdOf(row: Model, noun: string): number | null {
  if (noun === 'study') return row.get('id') as number;
  return (row.get('studyId') as number | null | undefined) ?? null;
}

/**
 * Hooks a model so that its audit trail cannot be forgotten: a write without `ctx` throws before it
 * reaches the database; a write with it leaves exactly one event in the same transaction, with what
 * the changed fields were and are, and why.
 */
export function audited(model: ModelStatic<Model>, noun: string): void {
  const guard = (_row: Model, options: unknown) => void contextOf(options, noun);
  model.addHook('beforeCreate', guard);
  model.addHook('beforeUpdate', guard);
  model.addHook('beforeDestroy', guard);
  for (const hook of [
    'beforeBulkCreate',
    'beforeBulkUpdate',
    'beforeBulkDestroy',
    'beforeUpsert',
  ] as const)
    model.addHook(hook, () => {
      throw new Error(`Write each ${noun} by itself: bulk writes leave no audit events.`);
    });
  const log =
    (action: string, changes: (row: Model) => { before: Fields | null; after: Fields | null }) =>
    async (row: Model, options: unknown) => {
      const { actor, transaction, requestId, why } = contextOf(options, noun);
      await AuditEvent.create(
        {
          // a new lab’s first event is its own
          labId: noun === 'lab' ? (row.get('id') as number) : actor.labId,
          actorId: actor.id === SYSTEM_ID ? null : actor.id,
          actorName: actor.name,
          actorRoles: actor.roles.join(', '),
          noun,
          nounId: row.get('id') as number,
          studyId: studyIdOf(row, noun),
          action,
          ...changes(row),
          why: why ?? null,
          requestId,
        },
        { transaction },
      );
    };
  const all = (row: Model) => Object.keys(row.get() as Record<string, unknown>);
  model.addHook(
    'afterCreate',
    log('created', (row) => ({ before: null, after: pick(row, all(row), 'now') })),
  );
  model.addHook(
    'afterUpdate',
    log('changed', (row) => {
      // inside afterUpdate `changed()` still names the fields of this save
      const keys = row.changed() || [];
      return { before: pick(row, keys, 'before'), after: pick(row, keys, 'now') };
    }),
  );
  model.addHook(
    'afterDestroy',
    log('removed', (row) => ({ before: pick(row, all(row), 'now'), after: null })),
  );
}
