-- What the schema generator cannot say of saved searches: the policy holds for the owner too, and what web's role may change.
ALTER TABLE saved_search FORCE ROW LEVEL SECURITY;--> statement-breakpoint
GRANT SELECT, INSERT, DELETE, UPDATE (name, query, shared) ON saved_search TO putlog_web;--> statement-breakpoint
GRANT UPDATE (section_columns) ON person TO putlog_web;
