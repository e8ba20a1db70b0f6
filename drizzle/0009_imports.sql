CREATE TABLE "import_acceptance" (
	"practice_id" uuid NOT NULL,
	"import_id" uuid NOT NULL,
	"key" text NOT NULL,
	"reason" text NOT NULL,
	"person_id" uuid NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "import_acceptance_practice_id_import_id_key_pk" PRIMARY KEY("practice_id","import_id","key"),
	CONSTRAINT "import_acceptance_reason" CHECK (length(trim("import_acceptance"."reason")) between 3 and 2000)
);
--> statement-breakpoint
ALTER TABLE "import_acceptance" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "import_mapping" (
	"practice_id" uuid NOT NULL,
	"supplier" text NOT NULL,
	"headings" text NOT NULL,
	"mapping" jsonb NOT NULL,
	"about" jsonb NOT NULL,
	"person_id" uuid NOT NULL,
	"used_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "import_mapping_practice_id_supplier_headings_pk" PRIMARY KEY("practice_id","supplier","headings")
);
--> statement-breakpoint
ALTER TABLE "import_mapping" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "section_import" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"state" text DEFAULT 'mapping' NOT NULL,
	"file_key" text NOT NULL,
	"file_name" text NOT NULL,
	"bytes" integer NOT NULL,
	"sha256" text NOT NULL,
	"source_key" text,
	"source_name" text,
	"source_sha256" text,
	"recognition" jsonb NOT NULL,
	"about" jsonb,
	"mapping" jsonb,
	"edits" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"fixes" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"phase" text,
	"done" integer DEFAULT 0 NOT NULL,
	"total" integer DEFAULT 0 NOT NULL,
	"facts" jsonb,
	"report" jsonb,
	"error" text,
	"version" integer DEFAULT 1 NOT NULL,
	"revision_id" uuid,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	"finished_at" timestamp with time zone,
	CONSTRAINT "section_import_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "section_import_state" CHECK ("section_import"."state" in ('mapping', 'checking', 'findings', 'committing', 'committed', 'cancelled', 'failed')),
	CONSTRAINT "section_import_phase" CHECK ("section_import"."phase" is null or "section_import"."phase" in ('reading', 'checking', 'writing')),
	CONSTRAINT "section_import_sha256" CHECK ("section_import"."sha256" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "section_import_key" CHECK (starts_with("section_import"."file_key", "section_import"."practice_id"::text || '/')),
	CONSTRAINT "section_import_committed_edition" CHECK ("section_import"."state" <> 'committed' or "section_import"."revision_id" is not null)
);
--> statement-breakpoint
ALTER TABLE "section_import" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "import_acceptance" ADD CONSTRAINT "import_acceptance_import_fk" FOREIGN KEY ("practice_id","import_id") REFERENCES "public"."section_import"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "import_acceptance" ADD CONSTRAINT "import_acceptance_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "import_mapping" ADD CONSTRAINT "import_mapping_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "section_import" ADD CONSTRAINT "section_import_revision_fk" FOREIGN KEY ("practice_id","revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "section_import" ADD CONSTRAINT "section_import_created_by_fk" FOREIGN KEY ("practice_id","created_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "import_mapping_headings" ON "import_mapping" USING btree ("practice_id","headings","used_at");--> statement-breakpoint
CREATE INDEX "section_import_newest" ON "section_import" USING btree ("practice_id","created_at");--> statement-breakpoint
CREATE INDEX "section_import_revision" ON "section_import" USING btree ("practice_id","revision_id");--> statement-breakpoint
CREATE INDEX "section_import_file" ON "section_import" USING btree ("practice_id","sha256");--> statement-breakpoint
CREATE POLICY "import_acceptance_of_practice" ON "import_acceptance" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "import_mapping_of_practice" ON "import_mapping" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "section_import_of_practice" ON "section_import" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);