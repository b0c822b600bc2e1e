/** Plays the invented scenario through the real server, so that every figure of the demo is one the product made itself. */
export { feedElements } from './play/feed-elements.js';
export { type DemoSettings, type DemoSignIn, loadDemo } from './play/load-demo.js';
