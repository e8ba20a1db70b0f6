ALTER TABLE "revision" DROP CONSTRAINT "revision_not_issued_by_author";--> statement-breakpoint
ALTER TABLE "revision" ALTER COLUMN "change_class" DROP NOT NULL;--> statement-breakpoint
ALTER TABLE "revision" ALTER COLUMN "consequence" DROP NOT NULL;--> statement-breakpoint
ALTER TABLE "revision" ADD COLUMN "editor_ids" uuid[] DEFAULT '{}' NOT NULL;--> statement-breakpoint
ALTER TABLE "revision" ADD COLUMN "abandoned_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_classed" CHECK ("revision"."state" = 'draft' or ("revision"."change_class" is not null and "revision"."consequence" is not null));--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_abandoned_draft" CHECK ("revision"."abandoned_at" is null or "revision"."state" = 'draft');--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_not_issued_by_author" CHECK ("revision"."state" in ('draft', 'in_review') or ("revision"."reviewer_id" is not null and "revision"."reviewer_id" <> "revision"."author_id" and "revision"."reviewer_id" <> all ("revision"."editor_ids")));