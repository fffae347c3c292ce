import type { Sequelize } from 'sequelize';
import { AuditEvent } from './AuditEvent';
import { Candidate } from './Candidate';
import { Counter } from './Counter';
import { Customer } from './Customer';
import { Fit } from './Fit';
import { IdempotencyKey } from './IdempotencyKey';
import { Invitation } from './Invitation';
import { Lab } from './Lab';
import { Matrix } from './Matrix';
import { Person } from './Person';
import { Release } from './Release';
import { Rig } from './Rig';
import { RigEnvelope } from './RigEnvelope';
import { Run } from './Run';
import { Sample } from './Sample';
import { Session } from './Session';
import { SieveStack } from './SieveStack';
import { StockEntry } from './StockEntry';
import { Study } from './Study';

const MODELS = [
  AuditEvent,
  Candidate,
  Counter,
  Customer,
  Fit,
  IdempotencyKey,
  Invitation,
  Lab,
  Matrix,
  Person,
  Release,
  Rig,
  RigEnvelope,
  Run,
  Sample,
  Session,
  SieveStack,
  StockEntry,
  Study,
];

/** Ties all models to one database. Tables come from the migrations, never from here. */
export function defineModels(sequelize: Sequelize): void {
  for (const model of MODELS) model.define(sequelize);
  for (const model of MODELS) if ('associate' in model) model.associate();
}
