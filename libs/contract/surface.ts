import type { Endpoint } from './endpoint';
import * as athletes from './athletes';
import * as auth from './auth';
import * as clips from './clips';
import * as comparison from './comparison';
import * as explanation from './explanation';
import * as exports from './export';
import * as health from './health';
import * as imports from './import';
import * as mail from './mail';
import * as marks from './marks';
import * as measures from './measures';
import * as people from './people';
import * as repeatability from './repeatability';
import * as reviewLists from './review-lists';
import * as reviews from './reviews';
import * as scale from './scale';
import * as sessions from './sessions';
import * as squads from './squads';
import * as stills from './stills';
import * as strokes from './strokes';
import * as targets from './targets';
import * as trend from './trend';

/** Whether an export of a contract file is a call (and not a schema beside it). */
function isEndpoint(value: unknown): value is Endpoint {
  return (
    typeof value === 'object' && value !== null && 'path' in value && 'access' in value && 'method' in value
  );
}

/** Every call of the HTTP surface; the OpenAPI document and the table of routes are made from this list. */
export const surface: readonly Endpoint[] = [
  health,
  auth,
  people,
  squads,
  athletes,
  sessions,
  clips,
  strokes,
  marks,
  measures,
  scale,
  explanation,
  comparison,
  trend,
  repeatability,
  reviews,
  stills,
  reviewLists,
  targets,
  exports,
  imports,
  mail,
].flatMap((file) => Object.values(file).filter(isEndpoint));
