import * as z from 'zod';

// The page's content policy forbids compiling code from text: zod must not even try, and it tries as soon as a schema
// is defined. Hence this before anything that imports the contracts.
z.config({ jitless: true });

import('./app/start')
  .then((file) => file.start())
  // Nothing of the app stands at this point: the browser's own report is all there is.
  .catch((error: unknown) => reportError(error));
