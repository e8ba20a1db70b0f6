-- Trusted extensions of the server's own distribution: an index by practice and words together, and how far words are apart.
CREATE EXTENSION IF NOT EXISTS btree_gin;--> statement-breakpoint
CREATE EXTENSION IF NOT EXISTS fuzzystrmatch;--> statement-breakpoint
CREATE TABLE "search_entry" (
	"practice_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"id" uuid NOT NULL,
	"mark" text NOT NULL,
	"mark_key" text NOT NULL,
	"title" text NOT NULL,
	"detail" text NOT NULL,
	"state" text NOT NULL,
	"standing" smallint NOT NULL,
	"place" text[] NOT NULL,
	"body" text NOT NULL,
	"names" "tsvector" NOT NULL,
	"words" "tsvector" NOT NULL,
	"job_id" uuid,
	"reader_id" uuid,
	"person_id" uuid,
	"changed_at" timestamp with time zone NOT NULL,
	CONSTRAINT "search_entry_practice_id_kind_id_pk" PRIMARY KEY("practice_id","kind","id"),
	CONSTRAINT "search_entry_kind" CHECK ("search_entry"."kind" in ('template', 'job', 'member', 'document', 'person', 'note')),
	CONSTRAINT "search_entry_standing" CHECK ("search_entry"."standing" between 0 and 3)
);
--> statement-breakpoint
ALTER TABLE "search_entry" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "search_word" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"word" text NOT NULL,
	CONSTRAINT "search_word_practice_id_id_pk" PRIMARY KEY("practice_id","id")
);
--> statement-breakpoint
ALTER TABLE "search_word" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE INDEX "search_entry_words" ON "search_entry" USING gin ("practice_id","words") WITH (fastupdate=false);--> statement-breakpoint
CREATE INDEX "search_entry_person" ON "search_entry" USING btree ("practice_id","person_id");--> statement-breakpoint
CREATE INDEX "search_entry_job" ON "search_entry" USING btree ("practice_id","job_id");--> statement-breakpoint
CREATE INDEX "search_word_word" ON "search_word" USING btree ("practice_id","word");--> statement-breakpoint
CREATE POLICY "search_entry_open_to_person" ON "search_entry" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid
  and (job_id is null or job_id in (select job.id from job where job.practice_id = nullif(current_setting('app.practice_id', true), '')::uuid))
  and (reader_id is null or reader_id = nullif(current_setting('app.person_id', true), '')::uuid or (select exists (select from membership where membership.practice_id = nullif(current_setting('app.practice_id', true), '')::uuid
  and membership.person_id = nullif(current_setting('app.person_id', true), '')::uuid and membership.active and 'librarian' = any (membership.roles))))) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "search_word_of_practice" ON "search_word" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);