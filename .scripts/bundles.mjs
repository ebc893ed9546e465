/** The bundles that the tests look at, each as its users get it. */
import { build } from './build.mjs';

await build(['addin', 'page', 'pane', 'cli']);
