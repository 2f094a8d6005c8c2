import * as club from './club';
import * as film from './film';
import * as mail from './mail';
import * as repeatability from './repeatability';
import * as review from './review';
import * as scale from './scale';
import * as signIn from './sign-in';
import * as targets from './targets';
import * as timing from './timing';
import * as view from './view';

/** Every table, for the ORM's typed queries and for the migration generator. */
export const schema = {
  ...club,
  ...signIn,
  ...film,
  ...repeatability,
  ...review,
  ...targets,
  ...scale,
  ...timing,
  ...view,
  ...mail,
};
