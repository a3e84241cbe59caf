import type { HelmetOptions } from 'helmet';
import type { Config } from '../config';

/** What a browser may load and do. Styles are inline because plots set them on their elements. */
export const contentPolicy = ({ tls }: Pick<Config, 'tls'>): HelmetOptions => ({
  contentSecurityPolicy: {
    useDefaults: false,
    directives: {
      defaultSrc: ["'self'"],
      scriptSrc: ["'self'"],
      styleSrc: ["'self'", "'unsafe-inline'"],
      imgSrc: ["'self'", 'data:', 'blob:'],
      fontSrc: ["'self'"],
      connectSrc: ["'self'"],
      objectSrc: ["'none'"],
      frameAncestors: ["'none'"],
      baseUri: ["'self'"],
      formAction: ["'self'"],
      ...(tls && { upgradeInsecureRequests: [] }),
    },
  },
  strictTransportSecurity: tls ? { maxAge: 31_536_000 } : false,
  // Without TLS browsers ignore it, and complain on the console where the host is not this machine.
  crossOriginOpenerPolicy: tls ? { policy: 'same-origin' } : false,
  originAgentCluster: tls,
  xFrameOptions: { action: 'deny' },
  referrerPolicy: { policy: 'same-origin' },
});
