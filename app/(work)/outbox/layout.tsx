/** The outbox stands among the settings. */
export { default } from '../settings/layout';
