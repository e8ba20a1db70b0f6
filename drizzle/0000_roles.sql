-- Roles belong to the server, not to the database: they may exist already, and two databases may be made at once.
DO $$
BEGIN
	CREATE ROLE putlog_web NOLOGIN;
EXCEPTION WHEN duplicate_object OR unique_violation THEN NULL;
END $$;--> statement-breakpoint
-- Owns the functions that find a person before her practice is known, and can do nothing else.
DO $$
BEGIN
	CREATE ROLE putlog_lookup NOLOGIN;
EXCEPTION WHEN duplicate_object OR unique_violation THEN NULL;
END $$;--> statement-breakpoint
-- The owner needs both: the policies are forced on her as well, and the functions are handed over to the second.
GRANT putlog_web, putlog_lookup TO CURRENT_USER;
