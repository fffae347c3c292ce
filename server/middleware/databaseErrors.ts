import { BaseError, ConnectionError, DatabaseError, TimeoutError } from 'sequelize';

const DEADLOCK = 1213;
const LOCK_WAIT = 1205;
const CHANGED_SINCE = 1020;
const STATEMENT_TIMEOUT = 1969;
const DISK_FULL = new Set([1021, 1114, 28]);
/** The server is shutting down, has closed the connection, or never answered. */
const GONE = new Set([
  1053, 1077, 1080, 1152, 1159, 1161, 1927, 2006, 2013, 45009, 45012, 45013, 45028,
]);
const GONE_CODES =
  /ECONN|EPIPE|ETIMEDOUT|PROTOCOL_CONNECTION|ER_SOCKET|ER_CONNECTION|ER_CMD_CONNECTION|GET_CONNECTION_TIMEOUT|ER_POOL|closed/i;

interface DriverError {
  readonly errno?: number;
  readonly code?: string;
  readonly message?: string;
  readonly fatal?: boolean;
}

function driverError(error: unknown): DriverError | undefined {
  if (error instanceof BaseError && 'original' in error) return error.original as DriverError;
  return error instanceof Error ? error : undefined;
}

/** Two transactions met: nothing of this one was kept, so it may simply run again. */
export function isLockConflict(error: unknown): boolean {
  const errno = driverError(error)?.errno;
  return errno === DEADLOCK || errno === LOCK_WAIT || errno === CHANGED_SINCE;
}

export function isStorageFull(error: unknown): boolean {
  const errno = driverError(error)?.errno;
  return errno !== undefined && DISK_FULL.has(errno);
}

/** The database is down, restarting or hung: answered as 503, and the pool heals by itself. */
export function isDatabaseAway(error: unknown): boolean {
  if (error instanceof ConnectionError || error instanceof TimeoutError) return true;
  const driver = driverError(error);
  if (!driver) return false;
  if (driver.errno !== undefined && (GONE.has(driver.errno) || driver.errno === STATEMENT_TIMEOUT))
    return true;
  const isFromDriver = error instanceof DatabaseError || driver.fatal === true;
  return isFromDriver && GONE_CODES.test(`${driver.code ?? ''} ${driver.message ?? ''}`);
}
