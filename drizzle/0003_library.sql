ALTER TYPE "public"."document_kind" ADD VALUE 'combination-set';--> statement-breakpoint
ALTER TYPE "public"."document_kind" ADD VALUE 'material-set';--> statement-breakpoint
CREATE TABLE "mail" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"data" jsonb NOT NULL,
	"mode" text NOT NULL,
	"dedupe" text NOT NULL,
	"state" text DEFAULT 'waiting' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"error" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"due_at" timestamp with time zone DEFAULT now() NOT NULL,
	"sent_at" timestamp with time zone,
	CONSTRAINT "mail_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "mail_kind" CHECK ("mail"."kind" in ('recall', 'withdrawn', 'issued', 'submitted', 'returned', 'commented', 'review_due', 'request')),
	CONSTRAINT "mail_mode" CHECK ("mail"."mode" in ('immediate', 'digest')),
	CONSTRAINT "mail_state" CHECK ("mail"."state" in ('waiting', 'sent', 'failed')),
	CONSTRAINT "mail_sent" CHECK (("mail"."state" = 'sent') = ("mail"."sent_at" is not null))
);
--> statement-breakpoint
ALTER TABLE "mail" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "notice" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"person_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"title" text NOT NULL,
	"detail" text DEFAULT '' NOT NULL,
	"href" text NOT NULL,
	"dedupe" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"read_at" timestamp with time zone,
	CONSTRAINT "notice_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "notice_kind" CHECK ("notice"."kind" in ('recall', 'withdrawn', 'issued', 'submitted', 'returned', 'commented', 'review_due', 'request'))
);
--> statement-breakpoint
ALTER TABLE "notice" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "notice_preference" (
	"practice_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"mode" text NOT NULL,
	CONSTRAINT "notice_preference_practice_id_person_id_kind_pk" PRIMARY KEY("practice_id","person_id","kind"),
	CONSTRAINT "notice_preference_kind" CHECK ("notice_preference"."kind" in ('recall', 'withdrawn', 'issued', 'submitted', 'returned', 'commented', 'review_due', 'request')),
	CONSTRAINT "notice_preference_mode" CHECK ("notice_preference"."mode" in ('immediate', 'digest', 'none'))
);
--> statement-breakpoint
ALTER TABLE "notice_preference" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "impact_member" (
	"practice_id" uuid NOT NULL,
	"run_id" uuid NOT NULL,
	"member_id" uuid NOT NULL,
	"flips" integer NOT NULL,
	"largest_change" double precision NOT NULL,
	"report" jsonb NOT NULL,
	CONSTRAINT "impact_member_practice_id_run_id_member_id_pk" PRIMARY KEY("practice_id","run_id","member_id")
);
--> statement-breakpoint
ALTER TABLE "impact_member" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "impact_run" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"revision_id" uuid NOT NULL,
	"sha256" text NOT NULL,
	"against_id" uuid NOT NULL,
	"engine_version" text NOT NULL,
	"state" text DEFAULT 'queued' NOT NULL,
	"done" integer DEFAULT 0 NOT NULL,
	"total" integer DEFAULT 0 NOT NULL,
	"error" text,
	"asked_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"finished_at" timestamp with time zone,
	CONSTRAINT "impact_run_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "impact_run_state" CHECK ("impact_run"."state" in ('queued', 'running', 'finished', 'failed'))
);
--> statement-breakpoint
ALTER TABLE "impact_run" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "proof_run" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"revision_id" uuid NOT NULL,
	"sha256" text NOT NULL,
	"engine_version" text NOT NULL,
	"state" text DEFAULT 'queued' NOT NULL,
	"done" integer DEFAULT 0 NOT NULL,
	"total" integer DEFAULT 0 NOT NULL,
	"passed" boolean,
	"report" jsonb,
	"error" text,
	"asked_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"finished_at" timestamp with time zone,
	CONSTRAINT "proof_run_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "proof_run_state" CHECK ("proof_run"."state" in ('queued', 'running', 'finished', 'failed'))
);
--> statement-breakpoint
ALTER TABLE "proof_run" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "recall" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"revision_id" uuid NOT NULL,
	"opened_by_id" uuid NOT NULL,
	"opened_at" timestamp with time zone DEFAULT now() NOT NULL,
	"closed_by_id" uuid,
	"closed_at" timestamp with time zone,
	CONSTRAINT "recall_practice_id_id_pk" PRIMARY KEY("practice_id","id")
);
--> statement-breakpoint
ALTER TABLE "recall" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "recall_use" (
	"practice_id" uuid NOT NULL,
	"recall_id" uuid NOT NULL,
	"member_id" uuid NOT NULL,
	"owner_id" uuid NOT NULL,
	"decision" text,
	"note" text DEFAULT '' NOT NULL,
	"decided_by_id" uuid,
	"decided_at" timestamp with time zone,
	CONSTRAINT "recall_use_practice_id_recall_id_member_id_pk" PRIMARY KEY("practice_id","recall_id","member_id"),
	CONSTRAINT "recall_use_decision" CHECK ("recall_use"."decision" is null or "recall_use"."decision" in ('unaffected', 'upgraded', 'redesigned', 'accepted', 'not_used')),
	CONSTRAINT "recall_use_decided_by_name" CHECK (num_nonnulls("recall_use"."decision", "recall_use"."decided_by_id", "recall_use"."decided_at") in (0, 3))
);
--> statement-breakpoint
ALTER TABLE "recall_use" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "request" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"number" integer NOT NULL,
	"kind" text NOT NULL,
	"title" text NOT NULL,
	"body" text DEFAULT '' NOT NULL,
	"context" jsonb NOT NULL,
	"document_id" uuid,
	"state" text DEFAULT 'open' NOT NULL,
	"answer" text DEFAULT '' NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"raised_by_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"handled_by_id" uuid,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "request_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "request_kind" CHECK ("request"."kind" in ('request', 'defect')),
	CONSTRAINT "request_state_known" CHECK ("request"."state" in ('open', 'accepted', 'declined', 'done'))
);
--> statement-breakpoint
ALTER TABLE "request" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "revision_comment" (
	"practice_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"revision_id" uuid NOT NULL,
	"parent_id" uuid,
	"pointer" text NOT NULL,
	"body" text NOT NULL,
	"author_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"resolved_at" timestamp with time zone,
	"resolved_by_id" uuid,
	CONSTRAINT "revision_comment_practice_id_id_pk" PRIMARY KEY("practice_id","id"),
	CONSTRAINT "revision_comment_body" CHECK (length(trim("revision_comment"."body")) between 1 and 4000)
);
--> statement-breakpoint
ALTER TABLE "revision_comment" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "revision_confirmation" (
	"practice_id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "revision_confirmation_practice_id_revision_id_pk" PRIMARY KEY("practice_id","revision_id")
);
--> statement-breakpoint
ALTER TABLE "revision_confirmation" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "watch" (
	"practice_id" uuid NOT NULL,
	"document_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"since" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "watch_practice_id_document_id_person_id_pk" PRIMARY KEY("practice_id","document_id","person_id")
);
--> statement-breakpoint
ALTER TABLE "watch" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "document" ADD COLUMN "review_by" date;--> statement-breakpoint
ALTER TABLE "document" ADD COLUMN "grace_days" integer DEFAULT 90 NOT NULL;--> statement-breakpoint
ALTER TABLE "document" ADD COLUMN "derived_from_id" uuid;--> statement-breakpoint
ALTER TABLE "revision" ADD COLUMN "version" integer DEFAULT 1 NOT NULL;--> statement-breakpoint
ALTER TABLE "mail" ADD CONSTRAINT "mail_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "notice" ADD CONSTRAINT "notice_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "notice_preference" ADD CONSTRAINT "notice_preference_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "impact_member" ADD CONSTRAINT "impact_member_run_fk" FOREIGN KEY ("practice_id","run_id") REFERENCES "public"."impact_run"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "impact_member" ADD CONSTRAINT "impact_member_member_fk" FOREIGN KEY ("practice_id","member_id") REFERENCES "public"."member"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "impact_run" ADD CONSTRAINT "impact_run_revision_fk" FOREIGN KEY ("practice_id","revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "impact_run" ADD CONSTRAINT "impact_run_against_fk" FOREIGN KEY ("practice_id","against_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "impact_run" ADD CONSTRAINT "impact_run_asked_by_fk" FOREIGN KEY ("practice_id","asked_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "proof_run" ADD CONSTRAINT "proof_run_revision_fk" FOREIGN KEY ("practice_id","revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "proof_run" ADD CONSTRAINT "proof_run_asked_by_fk" FOREIGN KEY ("practice_id","asked_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recall" ADD CONSTRAINT "recall_revision_fk" FOREIGN KEY ("practice_id","revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recall" ADD CONSTRAINT "recall_opened_by_fk" FOREIGN KEY ("practice_id","opened_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recall" ADD CONSTRAINT "recall_closed_by_fk" FOREIGN KEY ("practice_id","closed_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recall_use" ADD CONSTRAINT "recall_use_recall_fk" FOREIGN KEY ("practice_id","recall_id") REFERENCES "public"."recall"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recall_use" ADD CONSTRAINT "recall_use_member_fk" FOREIGN KEY ("practice_id","member_id") REFERENCES "public"."member"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recall_use" ADD CONSTRAINT "recall_use_owner_fk" FOREIGN KEY ("practice_id","owner_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recall_use" ADD CONSTRAINT "recall_use_decided_by_fk" FOREIGN KEY ("practice_id","decided_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "request" ADD CONSTRAINT "request_document_fk" FOREIGN KEY ("practice_id","document_id") REFERENCES "public"."document"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "request" ADD CONSTRAINT "request_raised_by_fk" FOREIGN KEY ("practice_id","raised_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "request" ADD CONSTRAINT "request_handled_by_fk" FOREIGN KEY ("practice_id","handled_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision_comment" ADD CONSTRAINT "revision_comment_revision_fk" FOREIGN KEY ("practice_id","revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision_comment" ADD CONSTRAINT "revision_comment_parent_fk" FOREIGN KEY ("practice_id","parent_id") REFERENCES "public"."revision_comment"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision_comment" ADD CONSTRAINT "revision_comment_author_fk" FOREIGN KEY ("practice_id","author_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision_comment" ADD CONSTRAINT "revision_comment_resolved_by_fk" FOREIGN KEY ("practice_id","resolved_by_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision_confirmation" ADD CONSTRAINT "revision_confirmation_revision_fk" FOREIGN KEY ("practice_id","revision_id") REFERENCES "public"."revision"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision_confirmation" ADD CONSTRAINT "revision_confirmation_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "watch" ADD CONSTRAINT "watch_document_fk" FOREIGN KEY ("practice_id","document_id") REFERENCES "public"."document"("practice_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "watch" ADD CONSTRAINT "watch_person_fk" FOREIGN KEY ("practice_id","person_id") REFERENCES "public"."membership"("practice_id","person_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "mail_dedupe" ON "mail" USING btree ("practice_id","person_id","dedupe");--> statement-breakpoint
CREATE INDEX "mail_due" ON "mail" USING btree ("practice_id","state","due_at");--> statement-breakpoint
CREATE UNIQUE INDEX "notice_dedupe" ON "notice" USING btree ("practice_id","person_id","dedupe");--> statement-breakpoint
CREATE INDEX "notice_newest" ON "notice" USING btree ("practice_id","person_id","created_at");--> statement-breakpoint
CREATE INDEX "impact_member_rank" ON "impact_member" USING btree ("practice_id","run_id","flips","largest_change");--> statement-breakpoint
CREATE INDEX "impact_run_revision" ON "impact_run" USING btree ("practice_id","revision_id","created_at");--> statement-breakpoint
CREATE INDEX "proof_run_revision" ON "proof_run" USING btree ("practice_id","revision_id","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "recall_revision" ON "recall" USING btree ("practice_id","revision_id");--> statement-breakpoint
CREATE INDEX "recall_use_owner" ON "recall_use" USING btree ("practice_id","owner_id");--> statement-breakpoint
CREATE INDEX "recall_use_member" ON "recall_use" USING btree ("practice_id","member_id");--> statement-breakpoint
CREATE UNIQUE INDEX "request_number" ON "request" USING btree ("practice_id","number");--> statement-breakpoint
CREATE INDEX "request_state" ON "request" USING btree ("practice_id","state","created_at");--> statement-breakpoint
CREATE INDEX "revision_comment_revision" ON "revision_comment" USING btree ("practice_id","revision_id","created_at");--> statement-breakpoint
CREATE INDEX "watch_person" ON "watch" USING btree ("practice_id","person_id");--> statement-breakpoint
ALTER TABLE "document" ADD CONSTRAINT "document_grace_days" CHECK ("document"."grace_days" between 0 and 3650);--> statement-breakpoint
CREATE POLICY "mail_of_practice" ON "mail" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "notice_of_practice" ON "notice" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "notice_preference_of_practice" ON "notice_preference" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "impact_member_of_practice" ON "impact_member" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "impact_run_of_practice" ON "impact_run" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "proof_run_of_practice" ON "proof_run" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "recall_of_practice" ON "recall" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "recall_use_of_practice" ON "recall_use" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "request_of_practice" ON "request" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "revision_comment_of_practice" ON "revision_comment" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "revision_confirmation_of_practice" ON "revision_confirmation" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "watch_of_practice" ON "watch" AS PERMISSIVE FOR ALL TO "putlog_web" USING (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid) WITH CHECK (practice_id = nullif(current_setting('app.practice_id', true), '')::uuid);