import type { Sequelize } from 'sequelize';
import type { Config } from './config';

/** What one process has one of. Set once at start-up; tests set their own. */
export interface Services {
  readonly config: Config;
  readonly sequelize: Sequelize;
}

let current: Services | undefined;

export function setServices(services: Services): void {
  current = services;
}

export function services(): Services {
  if (!current) throw new Error('The application was used before it was started.');
  return current;
}
