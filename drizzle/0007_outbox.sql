ALTER TABLE "mail" DROP CONSTRAINT "mail_state";--> statement-breakpoint
CREATE INDEX "mail_unsent" ON "mail" USING btree ("due_at") WHERE "mail"."state" in ('waiting', 'sending');--> statement-breakpoint
CREATE INDEX "notice_unread" ON "notice" USING btree ("practice_id","person_id") WHERE "notice"."read_at" is null;--> statement-breakpoint
ALTER TABLE "mail" ADD CONSTRAINT "mail_state" CHECK ("mail"."state" in ('waiting', 'sending', 'sent', 'failed'));--> statement-breakpoint
ALTER TABLE "notice_preference" ADD CONSTRAINT "notice_preference_not_recall" CHECK ("notice_preference"."kind" <> 'recall');