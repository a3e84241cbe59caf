import { pino } from 'pino';
import type { DestinationStream, Logger } from 'pino';
import type { Config } from './config';

/** Never in a log: what signs people in. */
const secrets = [
  'req.headers.cookie',
  'req.headers.authorization',
  'req.headers["x-csrf-token"]',
  'res.headers["set-cookie"]',
  '*.password',
  '*.currentPassword',
  '*.newPassword',
  '*.initialPassword',
];

export const createLog = ({ logLevel }: Pick<Config, 'logLevel'>, destination?: DestinationStream): Logger => {
  const options = { level: logLevel, redact: { paths: secrets, censor: '[kept out of the log]' } };
  return destination === undefined ? pino(options) : pino(options, destination);
};
