CREATE TYPE "public"."document_kind" AS ENUM('template', 'section-table', 'criteria');--> statement-breakpoint
CREATE TYPE "public"."revision_state" AS ENUM('draft', 'in_review', 'issued', 'superseded', 'withdrawn');--> statement-breakpoint
CREATE TABLE "api_token" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid NOT NULL,
	"name" text NOT NULL,
	"token_hash" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_used_at" timestamp with time zone,
	"expires_at" timestamp with time zone,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "api_token_practice_id_id_pk" PRIMARY KEY("practice_id","id")
);
--> statement-breakpoint
ALTER TABLE "api_token" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "credential" (
	"person_id" uuid PRIMARY KEY NOT NULL,
	"password_hash" text NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "credential" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "membership" (
	"practice_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"roles" text[] NOT NULL,
	"title" text DEFAULT '' NOT NULL,
	"active" boolean DEFAULT true NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "membership_practice_id_person_id_pk" PRIMARY KEY("practice_id","person_id"),
	CONSTRAINT "membership_roles" CHECK (cardinality("membership"."roles") > 0 and "membership"."roles" <@ array['reader', 'engineer', 'checker', 'librarian', 'principal', 'administrator'])
);
--> statement-breakpoint
ALTER TABLE "membership" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "person" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"initials" text NOT NULL,
	"unit_system" text DEFAULT 'metric' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "person_email_unique" UNIQUE("email"),
	CONSTRAINT "person_email_lower_case" CHECK ("person"."email" = lower("person"."email")),
	CONSTRAINT "person_unit_system" CHECK ("person"."unit_system" in ('metric', 'us'))
);
--> statement-breakpoint
ALTER TABLE "person" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "practice" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"offices" text[] DEFAULT '{}' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "practice_slug_unique" UNIQUE("slug")
);
--> statement-breakpoint
ALTER TABLE "practice" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "session" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid NOT NULL,
	"token_hash" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_seen_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"address" text,
	"agent" text,
	CONSTRAINT "session_practice_id_id_pk" PRIMARY KEY("practice_id","id")
);
--> statement-breakpoint
ALTER TABLE "session" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "sign_in_attempt" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"account_hash" text NOT NULL,
	"address_hash" text NOT NULL,
	"succeeded" boolean NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "audit_check" (
	"practice_id" uuid PRIMARY KEY NOT NULL,
	"checked_at" timestamp with time zone DEFAULT now() NOT NULL,
	"sequence" bigint NOT NULL,
	"hash" text NOT NULL,
	"fault" text
);
--> statement-breakpoint
ALTER TABLE "audit_check" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "audit_event" (
	"practice_id" uuid NOT NULL,
	"sequence" bigint NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"actor_id" uuid,
	"action" text NOT NULL,
	"subject_kind" text NOT NULL,
	"subject_id" text NOT NULL,
	"data" jsonb NOT NULL,
	"previous_hash" text NOT NULL,
	"hash" text NOT NULL,
	CONSTRAINT "audit_event_practice_id_sequence_pk" PRIMARY KEY("practice_id","sequence")
);
--> statement-breakpoint
ALTER TABLE "audit_event" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "job" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"number" text NOT NULL,
	"name" text NOT NULL,
	"client" text DEFAULT '' NOT NULL,
	"area" text DEFAULT '' NOT NULL,
	"basis" text DEFAULT '' NOT NULL,
	"unit_system" text DEFAULT 'metric' NOT NULL,
	"access" text DEFAULT 'practice' NOT NULL,
	"status" text DEFAULT 'open' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "job_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "job_unit_system" CHECK ("job"."unit_system" in ('metric', 'us')),
	CONSTRAINT "job_access" CHECK ("job"."access" in ('practice', 'named')),
	CONSTRAINT "job_status" CHECK ("job"."status" in ('open', 'closed'))
);
--> statement-breakpoint
ALTER TABLE "job" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "job_person" (
	"practice_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"added_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "job_person_practice_id_job_id_person_id_pk" PRIMARY KEY("practice_id","job_id","person_id")
);
--> statement-breakpoint
ALTER TABLE "job_person" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "document" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"kind" "document_kind" NOT NULL,
	"slug" text NOT NULL,
	"reference" text NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "document_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "document_slug_kebab" CHECK ("document"."slug" ~ '^[a-z0-9]+(-[a-z0-9]+)*$')
);
--> statement-breakpoint
ALTER TABLE "document" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "revision" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"document_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"state" "revision_state" DEFAULT 'draft' NOT NULL,
	"body" jsonb NOT NULL,
	"schema_version" integer NOT NULL,
	"engine_version" text NOT NULL,
	"sha256" text NOT NULL,
	"author_id" uuid NOT NULL,
	"reviewer_id" uuid,
	"change_note" text DEFAULT '' NOT NULL,
	"change_class" text NOT NULL,
	"consequence" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"submitted_at" timestamp with time zone,
	"issued_at" timestamp with time zone,
	"superseded_at" timestamp with time zone,
	"withdrawn_at" timestamp with time zone,
	"withdrawn_by_id" uuid,
	"withdrawal_reason" text,
	"withdrawal_severity" text,
	CONSTRAINT "revision_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "revision_sha256" CHECK ("revision"."sha256" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "revision_change_class" CHECK ("revision"."change_class" in ('error', 'code edition', 'improvement', 'wording')),
	CONSTRAINT "revision_consequence" CHECK ("revision"."consequence" in ('safety', 'service', 'cosmetic')),
	CONSTRAINT "revision_not_issued_by_author" CHECK ("revision"."state" in ('draft', 'in_review') or ("revision"."reviewer_id" is not null and "revision"."reviewer_id" <> "revision"."author_id")),
	CONSTRAINT "revision_issued_with_note" CHECK ("revision"."state" in ('draft', 'in_review') or length(trim("revision"."change_note")) > 0),
	CONSTRAINT "revision_withdrawn_with_reason" CHECK (("revision"."state" = 'withdrawn') = ("revision"."withdrawal_reason" is not null and "revision"."withdrawal_severity" is not null and "revision"."withdrawn_by_id" is not null))
);
--> statement-breakpoint
ALTER TABLE "revision" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "member" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"mark" text NOT NULL,
	"title" text DEFAULT '' NOT NULL,
	"purpose" text DEFAULT '' NOT NULL,
	"template_revision_id" uuid NOT NULL,
	"section_id" uuid,
	"material" text,
	"criteria_revision_id" uuid,
	"parameters" jsonb NOT NULL,
	"settings" jsonb NOT NULL,
	"status" text DEFAULT 'draft' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"result" jsonb,
	"fingerprint" text,
	"engine_version" text,
	"evaluated_at" timestamp with time zone,
	"evaluated_by_id" uuid,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_by_id" uuid NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "member_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "member_status" CHECK ("member"."status" in ('draft', 'ready', 'removed')),
	CONSTRAINT "member_fingerprint" CHECK ("member"."fingerprint" is null or "member"."fingerprint" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "member_result_whole" CHECK (num_nonnulls("member"."result", "member"."fingerprint", "member"."engine_version", "member"."evaluated_at", "member"."evaluated_by_id") in (0, 5))
);
--> statement-breakpoint
ALTER TABLE "member" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "process_beat" (
	"name" text PRIMARY KEY NOT NULL,
	"started_at" timestamp with time zone DEFAULT now() NOT NULL,
	"beat_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "section" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"revision_id" uuid NOT NULL,
	"table_slug" text NOT NULL,
	"designation" text NOT NULL,
	"designation_key" text NOT NULL,
	"printed" text NOT NULL,
	"shape" text NOT NULL,
	"depth_mm" double precision NOT NULL,
	"width_mm" double precision NOT NULL,
	"mass_kg_m" double precision NOT NULL,
	"area_cm2" double precision NOT NULL,
	"i_major_cm4" double precision NOT NULL,
	"i_minor_cm4" double precision NOT NULL,
	"w_el_cm3" double precision NOT NULL,
	"w_el_minor_cm3" double precision,
	"w_pl_cm3" double precision,
	"w_pl_minor_cm3" double precision,
	"j_cm4" double precision,
	"iw_cm6" double precision,
	"computed" text[] DEFAULT '{}' NOT NULL,
	"dimensions" jsonb NOT NULL,
	CONSTRAINT "section_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "section_shape" CHECK ("section"."shape" in ('i', 'channel', 'rhs', 'shs', 'chs', 'rectangle', 'round'))
);
--> statement-breakpoint
ALTER TABLE "section" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "api_token" ADD CONSTRAINT "api_token_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "credential" ADD CONSTRAINT "credential_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_practice_id_practice_id_fk" FOREIGN KEY ("practice_id") REFERENCES "public"."practice"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_check" ADD CONSTRAINT "audit_check_practice_id_practice_id_fk" FOREIGN KEY ("practice_id") REFERENCES "public"."practice"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_event" ADD CONSTRAINT "audit_event_practice_id_practice_id_fk" FOREIGN KEY ("practice_id") REFERENCES "public"."practice"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_practice_id_practice_id_fk" FOREIGN KEY ("practice_id") REFERENCES "public"."practice"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_created_by_fk" FOREIGN KEY ("practice_id","created_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job_person" ADD CONSTRAINT "job_person_job_fk" FOREIGN KEY ("practice_id","job_id") REFERENCES "public"."job"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job_person" ADD CONSTRAINT "job_person_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "document" ADD CONSTRAINT "document_practice_id_practice_id_fk" FOREIGN KEY ("practice_id") REFERENCES "public"."practice"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_document_fk" FOREIGN KEY ("practice_id","document_id") REFERENCES "public"."document"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_author_fk" FOREIGN KEY ("practice_id","author_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_reviewer_fk" FOREIGN KEY ("practice_id","reviewer_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_withdrawn_by_fk" FOREIGN KEY ("practice_id","withdrawn_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_job_fk" FOREIGN KEY ("practice_id","job_id") REFERENCES "public"."job"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_template_fk" FOREIGN KEY ("practice_id","template_revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_criteria_fk" FOREIGN KEY ("practice_id","criteria_revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_practice_id_section_id_section_practice_id_id_fk" FOREIGN KEY ("practice_id","section_id") REFERENCES "public"."section"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_created_by_fk" FOREIGN KEY ("practice_id","created_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_changed_by_fk" FOREIGN KEY ("practice_id","changed_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_evaluated_by_fk" FOREIGN KEY ("practice_id","evaluated_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "section" ADD CONSTRAINT "section_revision_fk" FOREIGN KEY ("practice_id","revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "api_token_hash" ON "api_token" USING btree ("token_hash");--> statement-breakpoint
CREATE INDEX "api_token_person" ON "api_token" USING btree ("practice_id","person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "session_token_hash" ON "session" USING btree ("token_hash");--> statement-breakpoint
CREATE INDEX "session_person" ON "session" USING btree ("practice_id","person_id");--> statement-breakpoint
CREATE INDEX "sign_in_attempt_account" ON "sign_in_attempt" USING btree ("account_hash","at");--> statement-breakpoint
CREATE INDEX "sign_in_attempt_address" ON "sign_in_attempt" USING btree ("address_hash","at");--> statement-breakpoint
CREATE INDEX "audit_event_subject" ON "audit_event" USING btree ("practice_id","subject_kind","subject_id","sequence");--> statement-breakpoint
CREATE UNIQUE INDEX "job_number" ON "job" USING btree ("practice_id","number");--> statement-breakpoint
CREATE INDEX "job_person_person" ON "job_person" USING btree ("practice_id","person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "document_slug" ON "document" USING btree ("practice_id","kind","slug");--> statement-breakpoint
CREATE UNIQUE INDEX "document_reference" ON "document" USING btree ("practice_id","reference");--> statement-breakpoint
CREATE UNIQUE INDEX "revision_number" ON "revision" USING btree ("practice_id","document_id","number");--> statement-breakpoint
CREATE UNIQUE INDEX "revision_one_issued" ON "revision" USING btree ("practice_id","document_id") WHERE state = 'issued';--> statement-breakpoint
CREATE INDEX "revision_state" ON "revision" USING btree ("practice_id","state");--> statement-breakpoint
CREATE UNIQUE INDEX "member_mark" ON "member" USING btree ("practice_id","job_id","mark");--> statement-breakpoint
CREATE INDEX "member_template" ON "member" USING btree ("practice_id","template_revision_id");--> statement-breakpoint
CREATE INDEX "member_section" ON "member" USING btree ("practice_id","section_id");--> statement-breakpoint
CREATE INDEX "member_criteria" ON "member" USING btree ("practice_id","criteria_revision_id");--> statement-breakpoint
CREATE UNIQUE INDEX "section_designation" ON "section" USING btree ("practice_id","revision_id","designation_key");--> statement-breakpoint
CREATE INDEX "section_depth" ON "section" USING btree ("practice_id","revision_id","depth_mm");--> statement-breakpoint
CREATE INDEX "section_mass" ON "section" USING btree ("practice_id","revision_id","mass_kg_m");--> statement-breakpoint
CREATE POLICY "api_token_of_practice" ON "api_token" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "credential_of_herself" ON "credential" AS PERMISSIVE FOR ALL TO "putlog_web" USING (person_id = nullif(current_setting('app.person_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "membership_of_practice" ON "membership" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "person_of_practice" ON "person" AS PERMISSIVE FOR SELECT TO "putlog_web" USING (exists (select from membership where membership.practice_id = nullif(current_setting('app.practice_id', true), '')::uuid and membership.person_id = person.id));--> statement-breakpoint
CREATE POLICY "person_new" ON "person" AS PERMISSIVE FOR INSERT TO "putlog_web" WITH CHECK (true);--> statement-breakpoint
CREATE POLICY "person_herself" ON "person" AS PERMISSIVE FOR UPDATE TO "putlog_web" USING (id = nullif(current_setting('app.person_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "practice_itself" ON "practice" AS PERMISSIVE FOR ALL TO "putlog_web" USING (id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "session_of_practice" ON "session" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "audit_check_of_practice" ON "audit_check" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "audit_event_of_practice" ON "audit_event" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "job_open_to_person" ON "job" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid and (access = 'practice' or created_by_id = nullif(current_setting('app.person_id', true), '')::uuid or (select exists (select from membership where membership.practice_id = nullif(current_setting('app.practice_id', true), '')::uuid
  and membership.person_id = nullif(current_setting('app.person_id', true), '')::uuid and membership.active and membership.roles && array['principal', 'administrator']))
  or exists (select from job_person where job_person.practice_id = job.practice_id and job_person.job_id = job.id and job_person.person_id = nullif(current_setting('app.person_id', true), '')::uuid))) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "job_person_of_practice" ON "job_person" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "document_of_practice" ON "document" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "revision_of_practice" ON "revision" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "member_of_open_job" ON "member" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid and exists (select from job where job.practice_id = member.practice_id and job.id = member.job_id));--> statement-breakpoint
CREATE POLICY "section_of_practice" ON "section" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);