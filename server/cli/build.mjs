/** `npm run build`: the web client into dist/. */
import { ensureDependencies, ensureWebBuild } from './prepare.mjs';

ensureDependencies();
ensureWebBuild();
