/** The settings that requests of the tests are served under. */
export const ORIGIN = 'http://localhost:4321';
export const DEMO = false;
export const PUTLOG_DEMO_MAIL = undefined;
