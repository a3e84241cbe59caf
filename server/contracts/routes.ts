import { auditRoutes } from './audit';
import { briefRoutes } from './briefs';
import { catalogueRoutes } from './catalogue';
import { designRoutes } from './designs';
import { deskRoutes } from './desk';
import { estimateRoutes } from './estimates';
import { instrumentRoutes } from './instruments';
import { mailRoutes } from './mail';
import { peopleRoutes } from './people';
import { recordRoutes } from './records';
import { revisionRoutes } from './revisions';
import { runRoutes } from './runs';
import { sessionRoutes } from './session';
import { systemRoutes } from './system';

/** Every route of the interface. What is not in this table is not served, and each row is tested for 401 and 403. */
export const allRoutes = {
  ...systemRoutes,
  ...sessionRoutes,
  ...peopleRoutes,
  ...briefRoutes,
  ...designRoutes,
  ...revisionRoutes,
  ...estimateRoutes,
  ...runRoutes,
  ...instrumentRoutes,
  ...catalogueRoutes,
  ...recordRoutes,
  ...deskRoutes,
  ...auditRoutes,
  ...mailRoutes,
};
