-- Mail that has gone out, or never will, is kept for a while and then removed: features/notice/outbox-sweep.server.ts.
GRANT DELETE ON mail TO putlog_web;
