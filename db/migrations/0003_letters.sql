DROP INDEX "schemes_letter";--> statement-breakpoint
CREATE UNIQUE INDEX "schemes_letter" ON "schemes" USING btree ("company_id","job_id","letter") WHERE archived_at is null;--> statement-breakpoint
DROP POLICY "people_self_update" ON "people" CASCADE;