CREATE TABLE "saved_search" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid NOT NULL,
	"name" text NOT NULL,
	"query" text NOT NULL,
	"shared" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "saved_search_practice_id_id_pk" PRIMARY KEY("practice_id","id")
);
--> statement-breakpoint
ALTER TABLE "saved_search" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "person" ADD COLUMN "section_columns" text[];--> statement-breakpoint
ALTER TABLE "saved_search" ADD CONSTRAINT "saved_search_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "saved_search_name" ON "saved_search" USING btree ("practice_id","person_id",lower("name"));--> statement-breakpoint
CREATE INDEX "saved_search_shared" ON "saved_search" USING btree ("practice_id") WHERE "saved_search"."shared";--> statement-breakpoint
CREATE POLICY "saved_search_of_person" ON "saved_search" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid and (shared or person_id = nullif(current_setting('app.person_id', true), '')::uuid)) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid and (shared or person_id = nullif(current_setting('app.person_id', true), '')::uuid));