CREATE TABLE "accounts" (
	"id" uuid PRIMARY KEY NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"password_hash" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "memberships" (
	"org_id" uuid NOT NULL,
	"account_id" uuid NOT NULL,
	"role" text NOT NULL,
	"person_id" uuid,
	"invited_at" timestamp with time zone DEFAULT now() NOT NULL,
	"joined_at" timestamp with time zone,
	CONSTRAINT "memberships_org_id_account_id_pk" PRIMARY KEY("org_id","account_id")
);
--> statement-breakpoint
CREATE TABLE "organisations" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"time_zone" text NOT NULL,
	"profile_id" text NOT NULL,
	"matrix" jsonb NOT NULL,
	"contact" text NOT NULL,
	"invented" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "password_tokens" (
	"token_hash" text PRIMARY KEY NOT NULL,
	"account_id" uuid NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"used_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "ledger_entries" (
	"org_id" uuid NOT NULL,
	"sequence" integer NOT NULL,
	"at" text NOT NULL,
	"kind" text NOT NULL,
	"actor" text NOT NULL,
	"subject" text NOT NULL,
	"commitment" text NOT NULL,
	"previous" text NOT NULL,
	"hash" text NOT NULL,
	"salt" text NOT NULL,
	"payload" text NOT NULL,
	"written_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "ledger_entries_org_id_sequence_pk" PRIMARY KEY("org_id","sequence")
);
--> statement-breakpoint
CREATE TABLE "ledger_heads" (
	"org_id" uuid PRIMARY KEY NOT NULL,
	"sequence" integer NOT NULL,
	"hash" text NOT NULL
);
--> statement-breakpoint
CREATE TABLE "blocks" (
	"org_id" uuid NOT NULL,
	"id" text NOT NULL,
	"version" integer NOT NULL,
	"body" jsonb NOT NULL,
	"added_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "blocks_org_id_id_version_pk" PRIMARY KEY("org_id","id","version")
);
--> statement-breakpoint
CREATE TABLE "employers" (
	"org_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"business_number" text DEFAULT '' NOT NULL,
	"contact" text DEFAULT '' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "employers_org_id_id_pk" PRIMARY KEY("org_id","id")
);
--> statement-breakpoint
CREATE TABLE "people" (
	"org_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"employer_id" uuid NOT NULL,
	"name" text NOT NULL,
	"trade" text NOT NULL,
	"contact" text DEFAULT '' NOT NULL,
	"induction_card" text DEFAULT '' NOT NULL,
	"language" text DEFAULT 'en' NOT NULL,
	"enrolled_self" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"archived_at" timestamp with time zone,
	CONSTRAINT "people_org_id_id_pk" PRIMARY KEY("org_id","id")
);
--> statement-breakpoint
CREATE TABLE "http_sessions" (
	"sid" varchar PRIMARY KEY NOT NULL,
	"sess" json NOT NULL,
	"expire" timestamp (6) NOT NULL
);
--> statement-breakpoint
CREATE TABLE "outgoing_mails" (
	"id" uuid PRIMARY KEY NOT NULL,
	"recipient" text NOT NULL,
	"subject" text NOT NULL,
	"body" text NOT NULL,
	"status" text DEFAULT 'queued' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"sent_at" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "throttles" (
	"key" varchar(255) PRIMARY KEY NOT NULL,
	"points" integer DEFAULT 0 NOT NULL,
	"expire" bigint
);
--> statement-breakpoint
CREATE TABLE "devices" (
	"org_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"secret_hash" text NOT NULL,
	"user_agent" text DEFAULT '' NOT NULL,
	"notice_version" integer NOT NULL,
	"enrolled_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_seen_at" timestamp with time zone DEFAULT now() NOT NULL,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "devices_org_id_id_pk" PRIMARY KEY("org_id","id")
);
--> statement-breakpoint
CREATE TABLE "sign_ons" (
	"org_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"statement_id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"revision_number" integer NOT NULL,
	"revision_hash" text NOT NULL,
	"person_id" uuid NOT NULL,
	"reading_ms" integer NOT NULL,
	"answers" jsonb NOT NULL,
	"method" text NOT NULL,
	"drawn" jsonb,
	"svg" text,
	"typed_name" text,
	"witness" text,
	"declaration" jsonb NOT NULL,
	"signed_at" timestamp with time zone NOT NULL,
	"received_at" timestamp with time zone NOT NULL,
	"language" text NOT NULL,
	"device_id" uuid,
	"user_agent" text DEFAULT '' NOT NULL,
	"handed_round_by" uuid,
	"handed_round_by_name" text,
	"person_name" text NOT NULL,
	"employer_name" text NOT NULL,
	"trade" text NOT NULL,
	"induction_card" text NOT NULL,
	"ledger_sequence" integer NOT NULL,
	CONSTRAINT "sign_ons_org_id_id_pk" PRIMARY KEY("org_id","id")
);
--> statement-breakpoint
CREATE TABLE "crew_members" (
	"org_id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"since" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "crew_members_org_id_site_id_person_id_pk" PRIMARY KEY("org_id","site_id","person_id")
);
--> statement-breakpoint
CREATE TABLE "day_codes" (
	"org_id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"day" date NOT NULL,
	"code" text NOT NULL,
	CONSTRAINT "day_codes_org_id_site_id_day_pk" PRIMARY KEY("org_id","site_id","day")
);
--> statement-breakpoint
CREATE TABLE "sites" (
	"org_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"address" text NOT NULL,
	"time_zone" text NOT NULL,
	"principal_contractor" text DEFAULT '' NOT NULL,
	"emergency" text DEFAULT '' NOT NULL,
	"sign_token" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"archived_at" timestamp with time zone,
	CONSTRAINT "sites_org_id_id_pk" PRIMARY KEY("org_id","id"),
	CONSTRAINT "sites_sign_token" UNIQUE("sign_token")
);
--> statement-breakpoint
CREATE TABLE "revisions" (
	"org_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"statement_id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"title" text NOT NULL,
	"canonical" text NOT NULL,
	"hash" text NOT NULL,
	"material" boolean NOT NULL,
	"change_note" text NOT NULL,
	"issued_by" uuid NOT NULL,
	"issued_by_name" text NOT NULL,
	"issued_at" timestamp with time zone NOT NULL,
	"words_on_cards" integer NOT NULL,
	"review_date" text,
	CONSTRAINT "revisions_org_id_id_pk" PRIMARY KEY("org_id","id"),
	CONSTRAINT "revisions_number" UNIQUE("org_id","statement_id","number")
);
--> statement-breakpoint
CREATE TABLE "statements" (
	"org_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"title" text NOT NULL,
	"state" text NOT NULL,
	"document_format" integer NOT NULL,
	"document" jsonb NOT NULL,
	"lock_version" integer DEFAULT 1 NOT NULL,
	"current_revision" integer,
	"return_note" text DEFAULT '' NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_by" uuid NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"submitted_by" uuid,
	"submitted_at" timestamp with time zone,
	"withdrawn_at" timestamp with time zone,
	CONSTRAINT "statements_org_id_id_pk" PRIMARY KEY("org_id","id")
);
--> statement-breakpoint
CREATE TABLE "attendances" (
	"org_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"talk_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"method" text NOT NULL,
	"drawn" jsonb,
	"svg" text,
	"typed_name" text,
	"witness" text,
	"declaration" jsonb NOT NULL,
	"signed_at" timestamp with time zone NOT NULL,
	"received_at" timestamp with time zone NOT NULL,
	"language" text NOT NULL,
	"device_id" uuid,
	"user_agent" text DEFAULT '' NOT NULL,
	"handed_round_by" uuid,
	"handed_round_by_name" text,
	"person_name" text NOT NULL,
	"employer_name" text NOT NULL,
	"trade" text NOT NULL,
	"induction_card" text NOT NULL,
	"ledger_sequence" integer NOT NULL,
	CONSTRAINT "attendances_org_id_id_pk" PRIMARY KEY("org_id","id"),
	CONSTRAINT "attendances_person" UNIQUE("org_id","talk_id","person_id")
);
--> statement-breakpoint
CREATE TABLE "talks" (
	"org_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"topic" text NOT NULL,
	"presenter" text NOT NULL,
	"date" text NOT NULL,
	"time" text NOT NULL,
	"minutes" integer NOT NULL,
	"place" text NOT NULL,
	"points" jsonb NOT NULL,
	"matters_raised" text NOT NULL,
	"outcome" text NOT NULL,
	"representative_present" boolean NOT NULL,
	"actions" jsonb NOT NULL,
	"state" text DEFAULT 'open' NOT NULL,
	"lock_version" integer DEFAULT 1 NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"closed_at" timestamp with time zone,
	"closed_by_name" text,
	"expected" jsonb,
	"canonical" text,
	"hash" text,
	"ledger_sequence" integer,
	CONSTRAINT "talks_org_id_id_pk" PRIMARY KEY("org_id","id")
);
--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_account_id_accounts_id_fk" FOREIGN KEY ("account_id") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "password_tokens" ADD CONSTRAINT "password_tokens_account_id_accounts_id_fk" FOREIGN KEY ("account_id") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ledger_entries" ADD CONSTRAINT "ledger_entries_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "ledger_heads" ADD CONSTRAINT "ledger_heads_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "blocks" ADD CONSTRAINT "blocks_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "employers" ADD CONSTRAINT "employers_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "people" ADD CONSTRAINT "people_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "people" ADD CONSTRAINT "people_org_id_employer_id_employers_org_id_id_fk" FOREIGN KEY ("org_id","employer_id") REFERENCES "public"."employers"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "devices" ADD CONSTRAINT "devices_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "devices" ADD CONSTRAINT "devices_org_id_person_id_people_org_id_id_fk" FOREIGN KEY ("org_id","person_id") REFERENCES "public"."people"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sign_ons" ADD CONSTRAINT "sign_ons_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sign_ons" ADD CONSTRAINT "sign_ons_handed_round_by_accounts_id_fk" FOREIGN KEY ("handed_round_by") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sign_ons" ADD CONSTRAINT "sign_ons_org_id_site_id_sites_org_id_id_fk" FOREIGN KEY ("org_id","site_id") REFERENCES "public"."sites"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sign_ons" ADD CONSTRAINT "sign_ons_org_id_statement_id_statements_org_id_id_fk" FOREIGN KEY ("org_id","statement_id") REFERENCES "public"."statements"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sign_ons" ADD CONSTRAINT "sign_ons_org_id_revision_id_revisions_org_id_id_fk" FOREIGN KEY ("org_id","revision_id") REFERENCES "public"."revisions"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sign_ons" ADD CONSTRAINT "sign_ons_org_id_person_id_people_org_id_id_fk" FOREIGN KEY ("org_id","person_id") REFERENCES "public"."people"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "crew_members" ADD CONSTRAINT "crew_members_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "crew_members" ADD CONSTRAINT "crew_members_org_id_site_id_sites_org_id_id_fk" FOREIGN KEY ("org_id","site_id") REFERENCES "public"."sites"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "crew_members" ADD CONSTRAINT "crew_members_org_id_person_id_people_org_id_id_fk" FOREIGN KEY ("org_id","person_id") REFERENCES "public"."people"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "day_codes" ADD CONSTRAINT "day_codes_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "day_codes" ADD CONSTRAINT "day_codes_org_id_site_id_sites_org_id_id_fk" FOREIGN KEY ("org_id","site_id") REFERENCES "public"."sites"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sites" ADD CONSTRAINT "sites_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revisions" ADD CONSTRAINT "revisions_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revisions" ADD CONSTRAINT "revisions_issued_by_accounts_id_fk" FOREIGN KEY ("issued_by") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revisions" ADD CONSTRAINT "revisions_org_id_statement_id_statements_org_id_id_fk" FOREIGN KEY ("org_id","statement_id") REFERENCES "public"."statements"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "statements" ADD CONSTRAINT "statements_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "statements" ADD CONSTRAINT "statements_created_by_accounts_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "statements" ADD CONSTRAINT "statements_updated_by_accounts_id_fk" FOREIGN KEY ("updated_by") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "statements" ADD CONSTRAINT "statements_submitted_by_accounts_id_fk" FOREIGN KEY ("submitted_by") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "statements" ADD CONSTRAINT "statements_org_id_site_id_sites_org_id_id_fk" FOREIGN KEY ("org_id","site_id") REFERENCES "public"."sites"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "attendances" ADD CONSTRAINT "attendances_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "attendances" ADD CONSTRAINT "attendances_handed_round_by_accounts_id_fk" FOREIGN KEY ("handed_round_by") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "attendances" ADD CONSTRAINT "attendances_org_id_talk_id_talks_org_id_id_fk" FOREIGN KEY ("org_id","talk_id") REFERENCES "public"."talks"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "attendances" ADD CONSTRAINT "attendances_org_id_person_id_people_org_id_id_fk" FOREIGN KEY ("org_id","person_id") REFERENCES "public"."people"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "talks" ADD CONSTRAINT "talks_org_id_organisations_id_fk" FOREIGN KEY ("org_id") REFERENCES "public"."organisations"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "talks" ADD CONSTRAINT "talks_created_by_accounts_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "talks" ADD CONSTRAINT "talks_org_id_site_id_sites_org_id_id_fk" FOREIGN KEY ("org_id","site_id") REFERENCES "public"."sites"("org_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "accounts_email" ON "accounts" USING btree (lower("email"));--> statement-breakpoint
CREATE INDEX "people_name" ON "people" USING btree ("org_id","name");--> statement-breakpoint
CREATE INDEX "http_sessions_expire" ON "http_sessions" USING btree ("expire");--> statement-breakpoint
CREATE INDEX "outgoing_mails_status" ON "outgoing_mails" USING btree ("status","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "devices_id" ON "devices" USING btree ("id");--> statement-breakpoint
CREATE INDEX "sign_ons_statement" ON "sign_ons" USING btree ("org_id","statement_id","person_id","revision_number");--> statement-breakpoint
CREATE INDEX "sign_ons_revision" ON "sign_ons" USING btree ("org_id","revision_id");--> statement-breakpoint
CREATE INDEX "revisions_hash" ON "revisions" USING btree ("hash");--> statement-breakpoint
CREATE INDEX "statements_site" ON "statements" USING btree ("org_id","site_id");--> statement-breakpoint
CREATE INDEX "talks_date" ON "talks" USING btree ("org_id","date");