CREATE TABLE "change_orders" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"state" text DEFAULT 'draft' NOT NULL,
	"started_by" text NOT NULL,
	"person_id" uuid NOT NULL,
	"reason" text NOT NULL,
	"choices" jsonb NOT NULL,
	"edition_id" uuid NOT NULL,
	"survey_id" uuid NOT NULL,
	"base_sequence" integer NOT NULL,
	"offer_id" uuid,
	"amount_cents" integer DEFAULT 0 NOT NULL,
	"decided_by" uuid,
	"decision_reason" text,
	"decided_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "change_orders_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "change_orders" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "offers" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"scheme_id" uuid,
	"change_order_id" uuid,
	"replaces" uuid,
	"body" text NOT NULL,
	"sha256" text NOT NULL,
	"total_cents" integer NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "offers_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "offers" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "pages" (
	"company_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"sequence" integer NOT NULL,
	"kind" text NOT NULL,
	"offer_id" uuid NOT NULL,
	"previous_sha256" text,
	"envelope" text NOT NULL,
	"sha256" text NOT NULL,
	"sealed_at" timestamp with time zone NOT NULL,
	CONSTRAINT "pages_company_id_job_id_sequence_pk" PRIMARY KEY("company_id","job_id","sequence")
);
--> statement-breakpoint
ALTER TABLE "pages" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "signatures" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"offer_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"role" text NOT NULL,
	"name" text NOT NULL,
	"offer_sha256" text NOT NULL,
	"consent_sha256" text NOT NULL,
	"means" jsonb NOT NULL,
	"signed_at" timestamp with time zone NOT NULL,
	CONSTRAINT "signatures_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "signatures" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "companies" (
	"id" uuid PRIMARY KEY NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"phone" text NOT NULL,
	"licence" text,
	"time_zone" text NOT NULL,
	"state" text NOT NULL,
	"brand" jsonb NOT NULL,
	"settings" jsonb NOT NULL,
	"clerk_organization_id" text NOT NULL,
	"stripe_account_id" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "companies" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "edition_costs" (
	"company_id" uuid NOT NULL,
	"edition_id" uuid NOT NULL,
	"body" jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "edition_costs_company_id_edition_id_pk" PRIMARY KEY("company_id","edition_id")
);
--> statement-breakpoint
ALTER TABLE "edition_costs" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "editions" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"number" integer NOT NULL,
	"body" jsonb NOT NULL,
	"sha256" text NOT NULL,
	"published_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "editions_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "editions" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "jobs" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"number" integer NOT NULL,
	"name" text NOT NULL,
	"address" text NOT NULL,
	"stage" text DEFAULT 'measured' NOT NULL,
	"salesperson_id" uuid NOT NULL,
	"survey_id" uuid,
	"edition_id" uuid,
	"first_estimate_cents" integer,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "jobs_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "jobs" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "surveys" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"body" jsonb NOT NULL,
	"sha256" text NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "surveys_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "surveys" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "draws" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"label" text NOT NULL,
	"due" text NOT NULL,
	"amount_cents" integer NOT NULL,
	"state" text DEFAULT 'planned' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "draws_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "draws" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "ledger" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"amount_cents" integer NOT NULL,
	"draw_id" uuid,
	"page_sequence" integer,
	"external_id" text,
	"memo" text NOT NULL,
	"at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "ledger_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "ledger" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "payments" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"draw_id" uuid NOT NULL,
	"intent_id" text NOT NULL,
	"amount_cents" integer NOT NULL,
	"status" text NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "payments_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "payments" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "guests" (
	"company_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"signer" boolean NOT NULL,
	"revoked_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "guests_company_id_job_id_person_id_pk" PRIMARY KEY("company_id","job_id","person_id")
);
--> statement-breakpoint
ALTER TABLE "guests" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "invitations" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"signer" boolean NOT NULL,
	"invited_by" uuid NOT NULL,
	"token_hash" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"accepted_at" timestamp with time zone,
	"revoked_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "invitations_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "invitations" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "members" (
	"company_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"role" text NOT NULL,
	"clerk_membership_id" text NOT NULL,
	"active" boolean DEFAULT true NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "members_company_id_person_id_pk" PRIMARY KEY("company_id","person_id")
);
--> statement-breakpoint
ALTER TABLE "members" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "people" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"clerk_user_id" text,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "people_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "people" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "audit" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid,
	"person_id" uuid,
	"actor" text NOT NULL,
	"verb" text NOT NULL,
	"subject" text NOT NULL,
	"detail" jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "audit_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "audit" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "webhook_events" (
	"source" text NOT NULL,
	"event_id" text NOT NULL,
	"company_id" uuid,
	"type" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "webhook_events_source_event_id_pk" PRIMARY KEY("source","event_id")
);
--> statement-breakpoint
ALTER TABLE "webhook_events" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "scheme_history" (
	"company_id" uuid NOT NULL,
	"job_id" uuid NOT NULL,
	"scheme_id" uuid NOT NULL,
	"version" integer NOT NULL,
	"change" jsonb NOT NULL,
	"choices" jsonb NOT NULL,
	"total_cents" integer NOT NULL,
	"person_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "scheme_history_company_id_scheme_id_version_pk" PRIMARY KEY("company_id","scheme_id","version")
);
--> statement-breakpoint
ALTER TABLE "scheme_history" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "schemes" (
	"company_id" uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"job_id" uuid NOT NULL,
	"letter" text NOT NULL,
	"name" text NOT NULL,
	"choices" jsonb NOT NULL,
	"decided" jsonb NOT NULL,
	"unsure" jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"total_cents" integer NOT NULL,
	"proposed" boolean DEFAULT false NOT NULL,
	"archived_at" timestamp with time zone,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "schemes_company_id_id_pk" PRIMARY KEY("company_id","id")
);
--> statement-breakpoint
ALTER TABLE "schemes" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "change_orders" ADD CONSTRAINT "change_orders_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "change_orders" ADD CONSTRAINT "change_orders_company_id_person_id_people_company_id_id_fk" FOREIGN KEY ("company_id","person_id") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "change_orders" ADD CONSTRAINT "change_orders_company_id_edition_id_editions_company_id_id_fk" FOREIGN KEY ("company_id","edition_id") REFERENCES "public"."editions"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "change_orders" ADD CONSTRAINT "change_orders_company_id_survey_id_surveys_company_id_id_fk" FOREIGN KEY ("company_id","survey_id") REFERENCES "public"."surveys"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "change_orders" ADD CONSTRAINT "change_orders_company_id_offer_id_offers_company_id_id_fk" FOREIGN KEY ("company_id","offer_id") REFERENCES "public"."offers"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offers" ADD CONSTRAINT "offers_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offers" ADD CONSTRAINT "offers_company_id_scheme_id_schemes_company_id_id_fk" FOREIGN KEY ("company_id","scheme_id") REFERENCES "public"."schemes"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offers" ADD CONSTRAINT "offers_company_id_change_order_id_change_orders_company_id_id_fk" FOREIGN KEY ("company_id","change_order_id") REFERENCES "public"."change_orders"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "offers" ADD CONSTRAINT "offers_company_id_created_by_people_company_id_id_fk" FOREIGN KEY ("company_id","created_by") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pages" ADD CONSTRAINT "pages_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "pages" ADD CONSTRAINT "pages_company_id_offer_id_offers_company_id_id_fk" FOREIGN KEY ("company_id","offer_id") REFERENCES "public"."offers"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signatures" ADD CONSTRAINT "signatures_company_id_offer_id_offers_company_id_id_fk" FOREIGN KEY ("company_id","offer_id") REFERENCES "public"."offers"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signatures" ADD CONSTRAINT "signatures_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signatures" ADD CONSTRAINT "signatures_company_id_person_id_people_company_id_id_fk" FOREIGN KEY ("company_id","person_id") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "edition_costs" ADD CONSTRAINT "edition_costs_company_id_edition_id_editions_company_id_id_fk" FOREIGN KEY ("company_id","edition_id") REFERENCES "public"."editions"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "editions" ADD CONSTRAINT "editions_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "editions" ADD CONSTRAINT "editions_company_id_published_by_people_company_id_id_fk" FOREIGN KEY ("company_id","published_by") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "jobs" ADD CONSTRAINT "jobs_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "jobs" ADD CONSTRAINT "jobs_company_id_salesperson_id_people_company_id_id_fk" FOREIGN KEY ("company_id","salesperson_id") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "jobs" ADD CONSTRAINT "jobs_company_id_survey_id_surveys_company_id_id_fk" FOREIGN KEY ("company_id","survey_id") REFERENCES "public"."surveys"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "jobs" ADD CONSTRAINT "jobs_company_id_edition_id_editions_company_id_id_fk" FOREIGN KEY ("company_id","edition_id") REFERENCES "public"."editions"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "surveys" ADD CONSTRAINT "surveys_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "surveys" ADD CONSTRAINT "surveys_company_id_created_by_people_company_id_id_fk" FOREIGN KEY ("company_id","created_by") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "draws" ADD CONSTRAINT "draws_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ledger" ADD CONSTRAINT "ledger_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ledger" ADD CONSTRAINT "ledger_company_id_draw_id_draws_company_id_id_fk" FOREIGN KEY ("company_id","draw_id") REFERENCES "public"."draws"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "payments" ADD CONSTRAINT "payments_company_id_draw_id_draws_company_id_id_fk" FOREIGN KEY ("company_id","draw_id") REFERENCES "public"."draws"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "payments" ADD CONSTRAINT "payments_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "payments" ADD CONSTRAINT "payments_company_id_created_by_people_company_id_id_fk" FOREIGN KEY ("company_id","created_by") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "guests" ADD CONSTRAINT "guests_company_id_person_id_people_company_id_id_fk" FOREIGN KEY ("company_id","person_id") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "guests" ADD CONSTRAINT "guests_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_company_id_invited_by_people_company_id_id_fk" FOREIGN KEY ("company_id","invited_by") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "members" ADD CONSTRAINT "members_company_id_person_id_people_company_id_id_fk" FOREIGN KEY ("company_id","person_id") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "people" ADD CONSTRAINT "people_company_id_companies_id_fk" FOREIGN KEY ("company_id") REFERENCES "public"."companies"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scheme_history" ADD CONSTRAINT "scheme_history_company_id_scheme_id_schemes_company_id_id_fk" FOREIGN KEY ("company_id","scheme_id") REFERENCES "public"."schemes"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scheme_history" ADD CONSTRAINT "scheme_history_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "scheme_history" ADD CONSTRAINT "scheme_history_company_id_person_id_people_company_id_id_fk" FOREIGN KEY ("company_id","person_id") REFERENCES "public"."people"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "schemes" ADD CONSTRAINT "schemes_company_id_job_id_jobs_company_id_id_fk" FOREIGN KEY ("company_id","job_id") REFERENCES "public"."jobs"("company_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "change_orders_number" ON "change_orders" USING btree ("company_id","job_id","number");--> statement-breakpoint
CREATE INDEX "change_orders_state" ON "change_orders" USING btree ("company_id","state");--> statement-breakpoint
CREATE INDEX "offers_job" ON "offers" USING btree ("company_id","job_id","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "pages_offer" ON "pages" USING btree ("company_id","offer_id");--> statement-breakpoint
CREATE UNIQUE INDEX "signatures_once" ON "signatures" USING btree ("company_id","offer_id","person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "companies_slug" ON "companies" USING btree ("slug");--> statement-breakpoint
CREATE UNIQUE INDEX "companies_organization" ON "companies" USING btree ("clerk_organization_id");--> statement-breakpoint
CREATE UNIQUE INDEX "companies_account" ON "companies" USING btree ("stripe_account_id");--> statement-breakpoint
CREATE UNIQUE INDEX "editions_number" ON "editions" USING btree ("company_id","number");--> statement-breakpoint
CREATE UNIQUE INDEX "jobs_number" ON "jobs" USING btree ("company_id","number");--> statement-breakpoint
CREATE UNIQUE INDEX "surveys_number" ON "surveys" USING btree ("company_id","job_id","number");--> statement-breakpoint
CREATE UNIQUE INDEX "draws_number" ON "draws" USING btree ("company_id","job_id","number");--> statement-breakpoint
CREATE UNIQUE INDEX "ledger_external" ON "ledger" USING btree ("company_id","kind","external_id");--> statement-breakpoint
CREATE UNIQUE INDEX "ledger_page" ON "ledger" USING btree ("company_id","job_id","page_sequence");--> statement-breakpoint
CREATE INDEX "ledger_job" ON "ledger" USING btree ("company_id","job_id");--> statement-breakpoint
CREATE UNIQUE INDEX "payments_intent" ON "payments" USING btree ("company_id","intent_id");--> statement-breakpoint
CREATE INDEX "payments_draw" ON "payments" USING btree ("company_id","draw_id");--> statement-breakpoint
CREATE INDEX "guests_person" ON "guests" USING btree ("company_id","person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "invitations_token" ON "invitations" USING btree ("token_hash");--> statement-breakpoint
CREATE INDEX "invitations_job" ON "invitations" USING btree ("company_id","job_id");--> statement-breakpoint
CREATE UNIQUE INDEX "people_email" ON "people" USING btree ("company_id","email");--> statement-breakpoint
CREATE UNIQUE INDEX "people_user" ON "people" USING btree ("company_id","clerk_user_id");--> statement-breakpoint
CREATE INDEX "people_clerk_user" ON "people" USING btree ("clerk_user_id");--> statement-breakpoint
CREATE INDEX "audit_job" ON "audit" USING btree ("company_id","job_id","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "schemes_letter" ON "schemes" USING btree ("company_id","job_id","letter");--> statement-breakpoint
CREATE POLICY "change_orders_select" ON "change_orders" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "change_orders_insert" ON "change_orders" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "change_orders_update" ON "change_orders" AS PERMISSIVE FOR UPDATE TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid))) WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "change_orders_delete" ON "change_orders" AS PERMISSIVE FOR DELETE TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "offers_select" ON "offers" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "offers_insert" ON "offers" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "pages_select" ON "pages" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "pages_insert" ON "pages" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "signatures_select" ON "signatures" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "signatures_insert" ON "signatures" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "companies_select" ON "companies" AS PERMISSIVE FOR SELECT TO "app_user" USING (id = (select nullif(current_setting('app.company', true), '')::uuid)
        or ((select nullif(current_setting('app.kind', true), '')) = 'slug' and slug = (select nullif(current_setting('app.key', true), '')))
        or ((select nullif(current_setting('app.kind', true), '')) = 'organization' and clerk_organization_id = (select nullif(current_setting('app.key', true), '')))
        or ((select nullif(current_setting('app.kind', true), '')) = 'account' and stripe_account_id = (select nullif(current_setting('app.key', true), ''))));--> statement-breakpoint
CREATE POLICY "companies_insert" ON "companies" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK (id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'worker');--> statement-breakpoint
CREATE POLICY "companies_update" ON "companies" AS PERMISSIVE FOR UPDATE TO "app_user" USING (id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) WITH CHECK (id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "edition_costs_select" ON "edition_costs" AS PERMISSIVE FOR SELECT TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "edition_costs_insert" ON "edition_costs" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "editions_select" ON "editions" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and true));--> statement-breakpoint
CREATE POLICY "editions_insert" ON "editions" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "jobs_select" ON "jobs" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "jobs_insert" ON "jobs" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "jobs_update" ON "jobs" AS PERMISSIVE FOR UPDATE TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "jobs_delete" ON "jobs" AS PERMISSIVE FOR DELETE TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "surveys_select" ON "surveys" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "surveys_insert" ON "surveys" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "draws_select" ON "draws" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "draws_insert" ON "draws" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "draws_update" ON "draws" AS PERMISSIVE FOR UPDATE TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid))) WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "draws_delete" ON "draws" AS PERMISSIVE FOR DELETE TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "ledger_select" ON "ledger" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "ledger_insert" ON "ledger" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "payments_select" ON "payments" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "payments_insert" ON "payments" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "payments_update" ON "payments" AS PERMISSIVE FOR UPDATE TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid))) WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "payments_delete" ON "payments" AS PERMISSIVE FOR DELETE TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "guests_select" ON "guests" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "guests_insert" ON "guests" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "guests_update" ON "guests" AS PERMISSIVE FOR UPDATE TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "guests_delete" ON "guests" AS PERMISSIVE FOR DELETE TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "guests_self" ON "guests" AS PERMISSIVE FOR SELECT TO "app_user" USING ((select nullif(current_setting('app.kind', true), '')) = 'person' and company_id = (select nullif(current_setting('app.company', true), '')::uuid) and person_id::text = (select nullif(current_setting('app.key', true), '')));--> statement-breakpoint
CREATE POLICY "invitations_select" ON "invitations" AS PERMISSIVE FOR SELECT TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "invitations_insert" ON "invitations" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "invitations_update" ON "invitations" AS PERMISSIVE FOR UPDATE TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "invitations_delete" ON "invitations" AS PERMISSIVE FOR DELETE TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "invitations_by_token" ON "invitations" AS PERMISSIVE FOR SELECT TO "app_user" USING ((select nullif(current_setting('app.kind', true), '')) = 'invitation' and company_id = (select nullif(current_setting('app.company', true), '')::uuid) and token_hash = (select nullif(current_setting('app.key', true), '')));--> statement-breakpoint
CREATE POLICY "members_select" ON "members" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and true));--> statement-breakpoint
CREATE POLICY "members_insert" ON "members" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "members_update" ON "members" AS PERMISSIVE FOR UPDATE TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "members_delete" ON "members" AS PERMISSIVE FOR DELETE TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "members_self" ON "members" AS PERMISSIVE FOR SELECT TO "app_user" USING ((select nullif(current_setting('app.kind', true), '')) = 'person' and company_id = (select nullif(current_setting('app.company', true), '')::uuid) and person_id::text = (select nullif(current_setting('app.key', true), '')));--> statement-breakpoint
CREATE POLICY "people_select" ON "people" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and (
        exists (select 1 from guests g where g.company_id = people.company_id and g.person_id = people.id and g.job_id = (select nullif(current_setting('app.job', true), '')::uuid))
        or exists (select 1 from members m where m.company_id = people.company_id and m.person_id = people.id))));--> statement-breakpoint
CREATE POLICY "people_insert" ON "people" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "people_update" ON "people" AS PERMISSIVE FOR UPDATE TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) WITH CHECK (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "people_delete" ON "people" AS PERMISSIVE FOR DELETE TO "app_user" USING (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker'));--> statement-breakpoint
CREATE POLICY "people_self" ON "people" AS PERMISSIVE FOR SELECT TO "app_user" USING ((select nullif(current_setting('app.kind', true), '')) = 'user' and clerk_user_id = (select nullif(current_setting('app.key', true), '')) and ((select nullif(current_setting('app.company', true), '')::uuid) is null or company_id = (select nullif(current_setting('app.company', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "people_self_update" ON "people" AS PERMISSIVE FOR UPDATE TO "app_user" USING ((select nullif(current_setting('app.kind', true), '')) = 'user' and clerk_user_id = (select nullif(current_setting('app.key', true), ''))) WITH CHECK ((select nullif(current_setting('app.kind', true), '')) = 'user' and (clerk_user_id is null or clerk_user_id = (select nullif(current_setting('app.key', true), ''))));--> statement-breakpoint
CREATE POLICY "audit_select" ON "audit" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "audit_insert" ON "audit" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "webhook_events_select" ON "webhook_events" AS PERMISSIVE FOR SELECT TO "app_user" USING ((select nullif(current_setting('app.kind', true), '')) in ('worker', 'organization', 'account', 'user')
  and (company_id is null or company_id = (select nullif(current_setting('app.company', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "webhook_events_insert" ON "webhook_events" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((select nullif(current_setting('app.kind', true), '')) in ('worker', 'organization', 'account', 'user')
  and (company_id is null or company_id = (select nullif(current_setting('app.company', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "scheme_history_select" ON "scheme_history" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "scheme_history_insert" ON "scheme_history" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "schemes_select" ON "schemes" AS PERMISSIVE FOR SELECT TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "schemes_insert" ON "schemes" AS PERMISSIVE FOR INSERT TO "app_user" WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "schemes_update" ON "schemes" AS PERMISSIVE FOR UPDATE TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid))) WITH CHECK ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "schemes_delete" ON "schemes" AS PERMISSIVE FOR DELETE TO "app_user" USING ((company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) in ('member', 'worker')) or (company_id = (select nullif(current_setting('app.company', true), '')::uuid) and (select nullif(current_setting('app.kind', true), '')) = 'guest' and job_id = (select nullif(current_setting('app.job', true), '')::uuid)));