CREATE SCHEMA "auth";
--> statement-breakpoint
CREATE TABLE "accounts" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"login_id" uuid NOT NULL,
	"name" text NOT NULL,
	"title" text NOT NULL,
	"roles" text[] NOT NULL,
	"registration_no" text,
	"deactivated_at" timestamp (3) with time zone,
	CONSTRAINT "accounts_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "accounts_login" UNIQUE("hospital_id","login_id"),
	CONSTRAINT "accounts_roles" CHECK ("accounts"."roles" <@ array['prescriber', 'pharmacist', 'nurse', 'lead', 'administrator']::text[])
);
--> statement-breakpoint
ALTER TABLE "accounts" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "memberships" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"account_id" uuid NOT NULL,
	"ward_id" uuid NOT NULL,
	"entitlements" text[] DEFAULT '{}' NOT NULL,
	CONSTRAINT "memberships_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "memberships_once" UNIQUE("hospital_id","account_id","ward_id"),
	CONSTRAINT "memberships_entitlements" CHECK ("memberships"."entitlements" <@ array['checking', 'senior', 'witness']::text[])
);
--> statement-breakpoint
ALTER TABLE "memberships" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "auth"."logins" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"hospital_id" uuid NOT NULL,
	"email" text NOT NULL,
	"password_hash" text,
	"failed_count" integer DEFAULT 0 NOT NULL,
	"locked_until" timestamp (3) with time zone,
	"disabled_at" timestamp (3) with time zone,
	CONSTRAINT "logins_hospital" UNIQUE("hospital_id","id"),
	CONSTRAINT "logins_failed_count" CHECK ("auth"."logins"."failed_count" >= 0)
);
--> statement-breakpoint
CREATE TABLE "auth"."one_time_tokens" (
	"sha256" text PRIMARY KEY NOT NULL,
	"login_id" uuid NOT NULL,
	"purpose" text NOT NULL,
	"made_at" timestamp (3) with time zone NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	"used_at" timestamp (3) with time zone,
	CONSTRAINT "one_time_tokens_purpose" CHECK ("auth"."one_time_tokens"."purpose" in ('invitation', 'password-reset')),
	CONSTRAINT "one_time_tokens_sha256" CHECK ("auth"."one_time_tokens"."sha256" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
CREATE TABLE "auth"."sessions" (
	"id" text PRIMARY KEY NOT NULL,
	"login_id" uuid NOT NULL,
	"kind" text DEFAULT 'own' NOT NULL,
	"made_at" timestamp (3) with time zone NOT NULL,
	"idle_until" timestamp (3) with time zone NOT NULL,
	"absolute_until" timestamp (3) with time zone NOT NULL,
	"locked_at" timestamp (3) with time zone,
	"suspended_by" text,
	"beside_of" text,
	"version_id" uuid,
	"agent" text,
	CONSTRAINT "sessions_kind" CHECK ("auth"."sessions"."kind" in ('own', 'beside')),
	CONSTRAINT "sessions_id" CHECK ("auth"."sessions"."id" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "sessions_beside" CHECK (("auth"."sessions"."kind" = 'beside') = ("auth"."sessions"."beside_of" is not null and "auth"."sessions"."version_id" is not null))
);
--> statement-breakpoint
CREATE TABLE "infusion_events" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"infusion_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"by_id" uuid NOT NULL,
	"rate_ml_h" numeric(7, 2),
	"volume_ml" numeric(7, 1),
	"reason" text,
	"detail" text,
	CONSTRAINT "infusion_events_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "infusion_events_kind" CHECK ("infusion_events"."kind" in ('started', 'infusing-confirmed', 'held', 'resumed', 'rate-lowered', 'rate-raised', 'next-volume', 'bag-changed', 'line-changed', 'handed-over', 'away', 'back', 'stopped', 'finished', 'replaced', 'reason-added'))
);
--> statement-breakpoint
ALTER TABLE "infusion_events" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "infusions" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"version_id" uuid NOT NULL,
	"author_id" uuid NOT NULL,
	"child_id" uuid NOT NULL,
	"started_by" uuid NOT NULL,
	"witness_id" uuid,
	"started_at" timestamp (3) with time zone NOT NULL,
	"ended_at" timestamp (3) with time zone,
	"ended_by" uuid,
	"ended_how" text,
	"end_reason" text,
	"infused_ml" numeric(7, 1),
	"bag_product_id" uuid NOT NULL,
	"bag_volume_ml" numeric(7, 1),
	"bag_number" text,
	"bag_batch" text,
	"bag_expires_on" date,
	"way" text NOT NULL,
	"pump" text,
	"channel" text,
	"line" text NOT NULL,
	"line_class" text NOT NULL,
	"pump_rate_ml_h" numeric(7, 2),
	"pump_volume_ml" numeric(7, 1),
	"comparisons" text NOT NULL,
	CONSTRAINT "infusions_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "infusions_version" UNIQUE("hospital_id","version_id"),
	CONSTRAINT "infusions_way" CHECK ("infusions"."way" in ('pump', 'syringe', 'pressure-bag', 'gravity', 'hand')),
	CONSTRAINT "infusions_ended_how" CHECK ("infusions"."ended_how" in ('stopped', 'finished', 'replaced')),
	CONSTRAINT "infusions_line_class" CHECK ("infusions"."line_class" in ('peripheral', 'central', 'intraosseous')),
	CONSTRAINT "infusions_by_another" CHECK ("infusions"."started_by" <> "infusions"."author_id"),
	CONSTRAINT "infusions_witness_another" CHECK ("infusions"."witness_id" <> "infusions"."started_by"),
	CONSTRAINT "infusions_ended" CHECK (("infusions"."ended_at" is null) = ("infusions"."ended_by" is null) and ("infusions"."ended_at" is null) = ("infusions"."ended_how" is null)),
	CONSTRAINT "infusions_pump_figures" CHECK (("infusions"."way" <> 'pump' or ("infusions"."pump_rate_ml_h" is not null and "infusions"."pump_volume_ml" is not null)) and ("infusions"."pump_rate_ml_h" is null or "infusions"."pump_rate_ml_h" > 0) and ("infusions"."pump_volume_ml" is null or "infusions"."pump_volume_ml" > 0) and ("infusions"."infused_ml" is null or "infusions"."infused_ml" >= 0))
);
--> statement-breakpoint
ALTER TABLE "infusions" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "prints" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"code" text NOT NULL,
	"version_id" uuid NOT NULL,
	"ledger_seq" bigint NOT NULL,
	"by_id" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"watermark" text,
	CONSTRAINT "prints_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "prints_code" UNIQUE("code"),
	CONSTRAINT "prints_code_form" CHECK ("prints"."code" ~ '^[A-Z2-7]{20}$')
);
--> statement-breakpoint
ALTER TABLE "prints" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "check_drafts" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"version_id" uuid NOT NULL,
	"account_id" uuid NOT NULL,
	"form" jsonb NOT NULL,
	"rev" integer DEFAULT 1 NOT NULL,
	"saved_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "check_drafts_hospital_id_version_id_account_id_pk" PRIMARY KEY("hospital_id","version_id","account_id")
);
--> statement-breakpoint
ALTER TABLE "check_drafts" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "checks" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"version_id" uuid NOT NULL,
	"author_id" uuid NOT NULL,
	"checker_id" uuid NOT NULL,
	"state" text NOT NULL,
	"opened_at" timestamp (3) with time zone NOT NULL,
	"figures" text,
	"figures_sha256" "bytea",
	"way" text,
	"locked_in_at" timestamp (3) with time zone,
	"reserved_until" timestamp (3) with time zone,
	"comparison" text,
	"choices_differ" boolean DEFAULT false NOT NULL,
	"returned_what" text,
	"reason" text,
	"passed_to" uuid,
	"is_beside" boolean DEFAULT false NOT NULL,
	"had_seen_figures" boolean DEFAULT false NOT NULL,
	"decided_at" timestamp (3) with time zone,
	CONSTRAINT "checks_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "checks_once" UNIQUE("hospital_id","version_id","checker_id"),
	CONSTRAINT "checks_state" CHECK ("checks"."state" in ('open', 'locked-agreed', 'agreed', 'differed', 'returned', 'passed-on', 'slip', 'expired')),
	CONSTRAINT "checks_way" CHECK ("checks"."way" in ('by-hand', 'worked-out')),
	CONSTRAINT "checks_by_another" CHECK ("checks"."checker_id" <> "checks"."author_id"),
	CONSTRAINT "checks_figures_sha256" CHECK (("checks"."figures" is null) = ("checks"."figures_sha256" is null) and ("checks"."figures" is null or "checks"."figures_sha256" = sha256(convert_to("checks"."figures", 'UTF8')))),
	CONSTRAINT "checks_locked_in" CHECK (("checks"."figures" is null) = ("checks"."locked_in_at" is null)),
	CONSTRAINT "checks_figures_with_state" CHECK ("checks"."state" not in ('locked-agreed', 'agreed', 'differed', 'slip') or "checks"."figures" is not null)
);
--> statement-breakpoint
ALTER TABLE "checks" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "exceptions" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"version_id" uuid NOT NULL,
	"author_id" uuid NOT NULL,
	"limit_code" text NOT NULL,
	"content_sha256" "bytea" NOT NULL,
	"state" text NOT NULL,
	"asked_at" timestamp (3) with time zone NOT NULL,
	"asked_reason" text,
	"asked_of" uuid,
	"by_id" uuid,
	"decided_at" timestamp (3) with time zone,
	"reason" text,
	"how" text,
	"recorded_by" uuid,
	"read_back_to" uuid,
	"countersign_due_at" timestamp (3) with time zone,
	"countersigned_at" timestamp (3) with time zone,
	"countersigned_by" uuid,
	"overdue_told_at" timestamp (3) with time zone,
	CONSTRAINT "exceptions_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "exceptions_state" CHECK ("exceptions"."state" in ('asked', 'granted', 'refused', 'void')),
	CONSTRAINT "exceptions_how" CHECK ("exceptions"."how" in ('here', 'telephone')),
	CONSTRAINT "exceptions_by_another" CHECK ("exceptions"."by_id" <> "exceptions"."author_id"),
	CONSTRAINT "exceptions_decided" CHECK ("exceptions"."state" not in ('granted', 'refused') or ("exceptions"."by_id" is not null and "exceptions"."decided_at" is not null and "exceptions"."reason" is not null and "exceptions"."how" is not null)),
	CONSTRAINT "exceptions_telephone" CHECK ("exceptions"."how" is distinct from 'telephone' or ("exceptions"."recorded_by" is not null and "exceptions"."read_back_to" is not null and "exceptions"."read_back_to" <> "exceptions"."recorded_by" and "exceptions"."read_back_to" <> "exceptions"."by_id" and "exceptions"."countersign_due_at" is not null))
);
--> statement-breakpoint
ALTER TABLE "exceptions" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "seen_figures" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"version_id" uuid NOT NULL,
	"account_id" uuid NOT NULL,
	"how" text NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "seen_figures_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "seen_figures_once" UNIQUE("hospital_id","version_id","account_id","how"),
	CONSTRAINT "seen_figures_how" CHECK ("seen_figures"."how" in ('read', 'advised', 'beside-cancelled', 'locked-in', 'exception', 'settlement', 'print'))
);
--> statement-breakpoint
ALTER TABLE "seen_figures" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "children" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"number" text NOT NULL,
	"surname" text NOT NULL,
	"given" text NOT NULL,
	"born_on" date NOT NULL,
	"born_at" timestamp (3) with time zone,
	"sex" text,
	"gestation_weeks" smallint,
	"gestation_days" smallint,
	"flags" text[] DEFAULT '{}' NOT NULL,
	"allergies" text NOT NULL,
	"surname_key" text collate "C" GENERATED ALWAYS AS (lower(surname)) STORED NOT NULL,
	"registered_by" uuid NOT NULL,
	"registered_at" timestamp (3) with time zone NOT NULL,
	"rev" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "children_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "children_number" UNIQUE("hospital_id","number"),
	CONSTRAINT "children_sex" CHECK ("children"."sex" in ('female', 'male')),
	CONSTRAINT "children_flags" CHECK ("children"."flags" <@ array['raised-adh', 'cardiac', 'renal', 'hepatic', 'raised-icp', 'severe-malnutrition', 'low-albumin', 'dka', 'metabolic', 'ketogenic-diet', 'nil-by-mouth', 'ceftriaxone']::text[]),
	CONSTRAINT "children_gestation_weeks" CHECK ("children"."gestation_weeks" between 20 and 45),
	CONSTRAINT "children_gestation_days" CHECK ("children"."gestation_days" is null or ("children"."gestation_days" between 0 and 6 and "children"."gestation_weeks" is not null))
);
--> statement-breakpoint
ALTER TABLE "children" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "fluid_plans" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"child_id" uuid NOT NULL,
	"what" text NOT NULL,
	"allowance_ml_per_24h" numeric(7, 1),
	"fraction" text,
	"reason" text NOT NULL,
	"by_id" uuid NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"ended_at" timestamp (3) with time zone,
	"ended_by" uuid,
	CONSTRAINT "fluid_plans_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "fluid_plans_what" CHECK ("fluid_plans"."what" in ('allowance', 'fraction')),
	CONSTRAINT "fluid_plans_fraction" CHECK ("fluid_plans"."fraction" in ('full', 'four-fifths', 'two-thirds', 'half')),
	CONSTRAINT "fluid_plans_value" CHECK (("fluid_plans"."what" = 'allowance') = ("fluid_plans"."allowance_ml_per_24h" is not null) and ("fluid_plans"."what" = 'fraction') = ("fluid_plans"."fraction" is not null) and ("fluid_plans"."allowance_ml_per_24h" is null or "fluid_plans"."allowance_ml_per_24h" >= 0))
);
--> statement-breakpoint
ALTER TABLE "fluid_plans" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "intakes" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"child_id" uuid NOT NULL,
	"what" text NOT NULL,
	"fluid" text,
	"ml" numeric(7, 1) NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"place" text,
	"by_id" uuid NOT NULL,
	"recorded_at" timestamp (3) with time zone NOT NULL,
	"superseded_by" uuid,
	CONSTRAINT "intakes_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "intakes_what" CHECK ("intakes"."what" in ('bolus', 'fluid', 'feed', 'drug', 'flush', 'other')),
	CONSTRAINT "intakes_ml" CHECK ("intakes"."ml" > 0)
);
--> statement-breakpoint
ALTER TABLE "intakes" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "results" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"child_id" uuid NOT NULL,
	"analyte" text NOT NULL,
	"value" numeric(10, 3) NOT NULL,
	"unit" text NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"by_id" uuid NOT NULL,
	"recorded_at" timestamp (3) with time zone NOT NULL,
	"superseded_by" uuid,
	CONSTRAINT "results_hospital_id_id_pk" PRIMARY KEY("hospital_id","id")
);
--> statement-breakpoint
ALTER TABLE "results" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "stays" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"child_id" uuid NOT NULL,
	"ward_id" uuid NOT NULL,
	"bed" text,
	"from_at" timestamp (3) with time zone NOT NULL,
	"to_at" timestamp (3) with time zone,
	CONSTRAINT "stays_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "stays_order" CHECK ("stays"."to_at" >= "stays"."from_at")
);
--> statement-breakpoint
ALTER TABLE "stays" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "hospitals" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"zone" text NOT NULL,
	CONSTRAINT "hospitals_name_unique" UNIQUE("name")
);
--> statement-breakpoint
CREATE TABLE "wards" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"is_high_dependency" boolean DEFAULT false NOT NULL,
	"closed_at" timestamp (3) with time zone,
	CONSTRAINT "wards_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "wards_name" UNIQUE("hospital_id","name")
);
--> statement-breakpoint
ALTER TABLE "wards" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "ledger" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"seq" bigint NOT NULL,
	"prev" "bytea" NOT NULL,
	"hash" "bytea" NOT NULL,
	"entry" text NOT NULL,
	"act" text GENERATED ALWAYS AS ((entry::jsonb #>> '{act}')) STORED,
	"outcome" text GENERATED ALWAYS AS ((entry::jsonb #>> '{outcome}')) STORED,
	"subject_kind" text GENERATED ALWAYS AS ((entry::jsonb #>> '{subject,kind}')) STORED,
	"subject_id" text GENERATED ALWAYS AS ((entry::jsonb #>> '{subject,id}')) STORED,
	"child_id" text GENERATED ALWAYS AS ((entry::jsonb #>> '{child}')) STORED,
	"actor_id" text GENERATED ALWAYS AS ((entry::jsonb #>> '{actor,id}')) STORED,
	"code" text GENERATED ALWAYS AS ((entry::jsonb #>> '{code}')) STORED,
	"at" text collate "C" GENERATED ALWAYS AS ((entry::jsonb #>> '{at}')) STORED,
	CONSTRAINT "ledger_hospital_id_seq_pk" PRIMARY KEY("hospital_id","seq"),
	CONSTRAINT "ledger_hash" CHECK ("ledger"."hash" = sha256("ledger"."prev" || int8send("ledger"."seq") || convert_to("ledger"."entry", 'UTF8'))),
	CONSTRAINT "ledger_entry" CHECK (act is not null and at ~ '^[0-9]{4}-[0-9]{2}-[0-9]{2}T[0-9:]{8}[.][0-9]{3}Z$'),
	CONSTRAINT "ledger_seq" CHECK ("ledger"."seq" >= 1)
);
--> statement-breakpoint
ALTER TABLE "ledger" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "ledger_heads" (
	"hospital_id" uuid PRIMARY KEY NOT NULL,
	"seq" bigint NOT NULL,
	"hash" "bytea" NOT NULL
);
--> statement-breakpoint
ALTER TABLE "ledger_heads" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "near_misses" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"class" text NOT NULL,
	"limit_code" text NOT NULL,
	"child_id" uuid,
	"version_id" uuid,
	"kind" text,
	"by_id" uuid,
	"at" timestamp (3) with time zone NOT NULL,
	"value" text,
	"limit_text" text,
	"detail" text,
	"dedupe" text NOT NULL,
	CONSTRAINT "near_misses_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "near_misses_dedupe" UNIQUE("hospital_id","dedupe"),
	CONSTRAINT "near_misses_class" CHECK ("near_misses"."class" in ('brim', 'senior', 'weight', 'wrong-child', 'check-differed', 'check-returned', 'choice-accepted', 'pharmacist', 'bedside', 'given-differed', 'our-fault'))
);
--> statement-breakpoint
ALTER TABLE "near_misses" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "drafts" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"version_id" uuid NOT NULL,
	"form" jsonb NOT NULL,
	"rev" integer DEFAULT 1 NOT NULL,
	"saved_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "drafts_hospital_id_version_id_pk" PRIMARY KEY("hospital_id","version_id")
);
--> statement-breakpoint
ALTER TABLE "drafts" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "order_counters" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"day" date NOT NULL,
	"last" integer NOT NULL,
	CONSTRAINT "order_counters_hospital_id_day_pk" PRIMARY KEY("hospital_id","day")
);
--> statement-breakpoint
ALTER TABLE "order_counters" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "order_versions" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"order_id" uuid NOT NULL,
	"version" integer NOT NULL,
	"child_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"state" text NOT NULL,
	"state_since" timestamp (3) with time zone NOT NULL,
	"live" boolean GENERATED ALWAYS AS ("state" in ('draft', 'awaiting-check', 'disputed', 'returned', 'awaiting-pharmacist', 'signed', 'running', 'held', 'away', 'given')) STORED NOT NULL,
	"author_id" uuid NOT NULL,
	"urgency" text DEFAULT 'routine' NOT NULL,
	"reason" text,
	"asked_start" timestamp (3) with time zone,
	"asked_checker" uuid,
	"check_due_at" timestamp (3) with time zone,
	"content" text,
	"content_sha256" "bytea",
	"rulebook_number" integer,
	"product_id" uuid,
	"is_high_risk" boolean DEFAULT false NOT NULL,
	"line_class" text,
	"weight_id" uuid,
	"weight_kg" numeric(6, 3),
	"rate_ml_h" numeric(7, 2),
	"volume_ml" numeric(7, 1),
	"over_min" integer,
	"planned_start" timestamp (3) with time zone,
	"start_by" timestamp (3) with time zone,
	"lapses_at" timestamp (3) with time zone,
	"signed_at" timestamp (3) with time zone,
	"checked_at" timestamp (3) with time zone,
	"given_at" timestamp (3) with time zone,
	"reminder_stage" integer DEFAULT 0 NOT NULL,
	"lapsing_told_at" timestamp (3) with time zone,
	"ended_at" timestamp (3) with time zone,
	"end_reason" text,
	"rev" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "order_versions_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "order_versions_number" UNIQUE("hospital_id","order_id","version"),
	CONSTRAINT "order_versions_author" UNIQUE("hospital_id","id","author_id"),
	CONSTRAINT "order_versions_child" UNIQUE("hospital_id","id","child_id"),
	CONSTRAINT "order_versions_state" CHECK ("order_versions"."state" in ('draft', 'awaiting-check', 'disputed', 'returned', 'awaiting-pharmacist', 'signed', 'running', 'held', 'away', 'stopped', 'finished', 'replaced', 'revised', 'withdrawn', 'discarded', 'lapsed', 'given', 'countersigned')),
	CONSTRAINT "order_versions_urgency" CHECK ("order_versions"."urgency" in ('routine', 'urgent', 'emergency')),
	CONSTRAINT "order_versions_line_class" CHECK ("order_versions"."line_class" in ('peripheral', 'central', 'intraosseous')),
	CONSTRAINT "order_versions_version" CHECK ("order_versions"."version" >= 1),
	CONSTRAINT "order_versions_asked_another" CHECK ("order_versions"."asked_checker" <> "order_versions"."author_id"),
	CONSTRAINT "order_versions_content_sha256" CHECK (("order_versions"."content" is null) = ("order_versions"."content_sha256" is null) and ("order_versions"."content" is null or "order_versions"."content_sha256" = sha256(convert_to("order_versions"."content", 'UTF8')))),
	CONSTRAINT "order_versions_content_with_state" CHECK (("order_versions"."content" is null) = ("order_versions"."state" in ('draft', 'discarded')) and ("order_versions"."content" is null) = ("order_versions"."signed_at" is null)),
	CONSTRAINT "order_versions_kind" CHECK ("order_versions"."kind" in ('maintenance', 'bolus')),
	CONSTRAINT "last_resort_maintenance" CHECK ("order_versions"."kind" <> 'maintenance' or ("order_versions"."rate_ml_h" is null and "order_versions"."content" is null) or ("order_versions"."rate_ml_h" is not null and "order_versions"."weight_kg" is not null and "order_versions"."rate_ml_h" * 24 <= 2500)),
	CONSTRAINT "last_resort_bolus" CHECK ("order_versions"."kind" <> 'bolus' or ("order_versions"."volume_ml" is null and "order_versions"."content" is null) or ("order_versions"."volume_ml" is not null and "order_versions"."volume_ml" <= 500 and case when "order_versions"."weight_kg" is null then "order_versions"."urgency" = 'emergency' else "order_versions"."volume_ml" <= 20 * "order_versions"."weight_kg" end)),
	CONSTRAINT "last_resort_positive" CHECK (("order_versions"."weight_kg" is null or "order_versions"."weight_kg" > 0) and ("order_versions"."rate_ml_h" is null or "order_versions"."rate_ml_h" > 0) and ("order_versions"."volume_ml" is null or "order_versions"."volume_ml" > 0) and ("order_versions"."over_min" is null or "order_versions"."over_min" > 0))
);
--> statement-breakpoint
ALTER TABLE "order_versions" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "orders" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"code" text NOT NULL,
	"child_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"follows" uuid,
	"made_by" uuid NOT NULL,
	"made_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "orders_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "orders_code" UNIQUE("hospital_id","code"),
	CONSTRAINT "orders_child_kind" UNIQUE("hospital_id","id","child_id","kind"),
	CONSTRAINT "orders_kind" CHECK ("orders"."kind" in ('maintenance', 'bolus')),
	CONSTRAINT "orders_code_form" CHECK ("orders"."code" ~ '^BL-[0-9]{6}-[0-9]{3,}$')
);
--> statement-breakpoint
ALTER TABLE "orders" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "answers" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"account_id" uuid NOT NULL,
	"key" text NOT NULL,
	"request_sha256" "bytea" NOT NULL,
	"status" text,
	"body" text,
	"at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "answers_hospital_id_account_id_key_pk" PRIMARY KEY("hospital_id","account_id","key")
);
--> statement-breakpoint
ALTER TABLE "answers" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "outbox" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"kind" text NOT NULL,
	"to_account" uuid NOT NULL,
	"ref" jsonb NOT NULL,
	"state" text DEFAULT 'due' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"made_at" timestamp (3) with time zone NOT NULL,
	"due_at" timestamp (3) with time zone NOT NULL,
	"sent_at" timestamp (3) with time zone,
	"last_error" text,
	CONSTRAINT "outbox_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "outbox_state" CHECK ("outbox"."state" in ('due', 'sent', 'dead', 'dropped')),
	CONSTRAINT "outbox_attempts" CHECK ("outbox"."attempts" >= 0)
);
--> statement-breakpoint
ALTER TABLE "outbox" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "rulebooks" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"number" integer NOT NULL,
	"state" text NOT NULL,
	"content" text NOT NULL,
	"content_sha256" "bytea" NOT NULL,
	"drafted_by" uuid NOT NULL,
	"drafted_at" timestamp (3) with time zone NOT NULL,
	"approved_by" uuid,
	"approved_at" timestamp (3) with time zone,
	"in_force_from" timestamp (3) with time zone,
	"retired_at" timestamp (3) with time zone,
	CONSTRAINT "rulebooks_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "rulebooks_number" UNIQUE("hospital_id","number"),
	CONSTRAINT "rulebooks_state" CHECK ("rulebooks"."state" in ('draft', 'in-force', 'retired', 'withdrawn')),
	CONSTRAINT "rulebooks_content_sha256" CHECK (("rulebooks"."content" is null) = ("rulebooks"."content_sha256" is null) and ("rulebooks"."content" is null or "rulebooks"."content_sha256" = sha256(convert_to("rulebooks"."content", 'UTF8')))),
	CONSTRAINT "rulebooks_number_positive" CHECK ("rulebooks"."number" >= 1),
	CONSTRAINT "rulebooks_approved_by_another" CHECK ("rulebooks"."approved_by" <> "rulebooks"."drafted_by"),
	CONSTRAINT "rulebooks_in_force_approved" CHECK ("rulebooks"."state" in ('draft', 'withdrawn') or ("rulebooks"."approved_by" is not null and "rulebooks"."approved_at" is not null and "rulebooks"."in_force_from" is not null))
);
--> statement-breakpoint
ALTER TABLE "rulebooks" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "products" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"base" text NOT NULL,
	"added_potassium_mmol_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"sodium_mmol_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"potassium_mmol_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"chloride_mmol_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"calcium_mmol_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"magnesium_mmol_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"lactate_mmol_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"acetate_mmol_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"gluconate_mmol_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"glucose_g_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"albumin_g_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"osmolarity_mosm_l" numeric(7, 2) DEFAULT 0 NOT NULL,
	"bag_sizes_ml" integer[] NOT NULL,
	"is_ready_mixed" boolean DEFAULT true NOT NULL,
	"is_high_risk" boolean DEFAULT false NOT NULL,
	"kinds" text[] NOT NULL,
	"is_newborn_only" boolean DEFAULT false NOT NULL,
	"gtins" text[] DEFAULT '{}' NOT NULL,
	"position" integer DEFAULT 0 NOT NULL,
	"added_at" timestamp (3) with time zone NOT NULL,
	"retired_at" timestamp (3) with time zone,
	"rev" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "products_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "products_name" UNIQUE("hospital_id","name"),
	CONSTRAINT "products_kinds" CHECK ("products"."kinds" <@ array['maintenance', 'bolus']::text[]),
	CONSTRAINT "products_bag_sizes" CHECK (0 < all ("products"."bag_sizes_ml"))
);
--> statement-breakpoint
ALTER TABLE "products" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "signatures" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"version_id" uuid,
	"rulebook_id" uuid,
	"exception_id" uuid,
	"meaning" text NOT NULL,
	"by_id" uuid NOT NULL,
	"printed_name" text NOT NULL,
	"printed_title" text NOT NULL,
	"printed_registration_no" text,
	"at" timestamp (3) with time zone NOT NULL,
	"how" text NOT NULL,
	"content_sha256" "bytea" NOT NULL,
	"note" text,
	CONSTRAINT "signatures_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "signatures_meaning" CHECK ("signatures"."meaning" in ('author', 'independent-check', 'pharmacist', 'bedside', 'witness', 'exception', 'settlement', 'countersignature', 'rulebook-approval')),
	CONSTRAINT "signatures_how" CHECK ("signatures"."how" in ('password', 'session')),
	CONSTRAINT "signatures_subject" CHECK (num_nonnulls("signatures"."version_id", "signatures"."rulebook_id") = 1)
);
--> statement-breakpoint
ALTER TABLE "signatures" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "heights" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"child_id" uuid NOT NULL,
	"cm" numeric(4, 1) NOT NULL,
	"method" text NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"by_id" uuid NOT NULL,
	"recorded_at" timestamp (3) with time zone NOT NULL,
	"superseded_by" uuid,
	CONSTRAINT "heights_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "heights_method" CHECK ("heights"."method" in ('measured', 'estimated', 'stated')),
	CONSTRAINT "heights_cm" CHECK ("heights"."cm" > 20 and "heights"."cm" < 250)
);
--> statement-breakpoint
ALTER TABLE "heights" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "weights" (
	"hospital_id" uuid DEFAULT nullif(current_setting('app.hospital_id', true), '')::uuid NOT NULL,
	"id" uuid DEFAULT gen_random_uuid() NOT NULL,
	"child_id" uuid NOT NULL,
	"kg" numeric(6, 3) NOT NULL,
	"method" text NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"by_id" uuid NOT NULL,
	"recorded_at" timestamp (3) with time zone NOT NULL,
	"z" numeric(5, 2),
	"finding" text,
	"needs" text DEFAULT 'nothing' NOT NULL,
	"second_kg" numeric(6, 3),
	"second_method" text,
	"second_at" timestamp (3) with time zone,
	"second_by" uuid,
	"confirmed_by" uuid,
	"confirmed_at" timestamp (3) with time zone,
	"superseded_by" uuid,
	"superseded_reason" text,
	CONSTRAINT "weights_hospital_id_id_pk" PRIMARY KEY("hospital_id","id"),
	CONSTRAINT "weights_method" CHECK ("weights"."method" in ('scales', 'baby-scales', 'bed-scales', 'stated', 'estimated-age', 'estimated-tape', 'birth-weight')),
	CONSTRAINT "weights_second_method" CHECK ("weights"."second_method" in ('scales', 'baby-scales', 'bed-scales', 'stated', 'estimated-age', 'estimated-tape', 'birth-weight')),
	CONSTRAINT "weights_needs" CHECK ("weights"."needs" in ('nothing', 'second-measurement', 'second-person')),
	CONSTRAINT "last_resort_weight" CHECK ("weights"."kg" > 0 and "weights"."kg" <= 250),
	CONSTRAINT "weights_second_kg" CHECK ("weights"."second_kg" > 0 and "weights"."second_kg" <= 250),
	CONSTRAINT "weights_second" CHECK (num_nonnulls("weights"."second_kg", "weights"."second_method", "weights"."second_at", "weights"."second_by") in (0, 4)),
	CONSTRAINT "weights_confirmed_by_another" CHECK ("weights"."confirmed_by" <> "weights"."by_id"),
	CONSTRAINT "weights_confirmed" CHECK (("weights"."confirmed_by" is null) = ("weights"."confirmed_at" is null))
);
--> statement-breakpoint
ALTER TABLE "weights" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "accounts" ADD CONSTRAINT "accounts_login_fk" FOREIGN KEY ("hospital_id","login_id") REFERENCES "auth"."logins"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_account_fk" FOREIGN KEY ("hospital_id","account_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_ward_fk" FOREIGN KEY ("hospital_id","ward_id") REFERENCES "public"."wards"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "auth"."logins" ADD CONSTRAINT "logins_hospital_id_hospitals_id_fk" FOREIGN KEY ("hospital_id") REFERENCES "public"."hospitals"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "auth"."one_time_tokens" ADD CONSTRAINT "one_time_tokens_login_id_logins_id_fk" FOREIGN KEY ("login_id") REFERENCES "auth"."logins"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "auth"."sessions" ADD CONSTRAINT "sessions_login_id_logins_id_fk" FOREIGN KEY ("login_id") REFERENCES "auth"."logins"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "infusion_events" ADD CONSTRAINT "infusion_events_infusion_fk" FOREIGN KEY ("hospital_id","infusion_id") REFERENCES "public"."infusions"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "infusion_events" ADD CONSTRAINT "infusion_events_by_fk" FOREIGN KEY ("hospital_id","by_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "infusions" ADD CONSTRAINT "infusions_version_author_fk" FOREIGN KEY ("hospital_id","version_id","author_id") REFERENCES "public"."order_versions"("hospital_id","id","author_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "infusions" ADD CONSTRAINT "infusions_version_child_fk" FOREIGN KEY ("hospital_id","version_id","child_id") REFERENCES "public"."order_versions"("hospital_id","id","child_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "infusions" ADD CONSTRAINT "infusions_started_by_fk" FOREIGN KEY ("hospital_id","started_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "infusions" ADD CONSTRAINT "infusions_witness_fk" FOREIGN KEY ("hospital_id","witness_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "infusions" ADD CONSTRAINT "infusions_ended_by_fk" FOREIGN KEY ("hospital_id","ended_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "infusions" ADD CONSTRAINT "infusions_bag_product_fk" FOREIGN KEY ("hospital_id","bag_product_id") REFERENCES "public"."products"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "prints" ADD CONSTRAINT "prints_version_fk" FOREIGN KEY ("hospital_id","version_id") REFERENCES "public"."order_versions"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "prints" ADD CONSTRAINT "prints_by_fk" FOREIGN KEY ("hospital_id","by_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "check_drafts" ADD CONSTRAINT "check_drafts_version_fk" FOREIGN KEY ("hospital_id","version_id") REFERENCES "public"."order_versions"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "check_drafts" ADD CONSTRAINT "check_drafts_account_fk" FOREIGN KEY ("hospital_id","account_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checks" ADD CONSTRAINT "checks_version_author_fk" FOREIGN KEY ("hospital_id","version_id","author_id") REFERENCES "public"."order_versions"("hospital_id","id","author_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checks" ADD CONSTRAINT "checks_checker_fk" FOREIGN KEY ("hospital_id","checker_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "checks" ADD CONSTRAINT "checks_passed_to_fk" FOREIGN KEY ("hospital_id","passed_to") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exceptions" ADD CONSTRAINT "exceptions_version_author_fk" FOREIGN KEY ("hospital_id","version_id","author_id") REFERENCES "public"."order_versions"("hospital_id","id","author_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exceptions" ADD CONSTRAINT "exceptions_by_fk" FOREIGN KEY ("hospital_id","by_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exceptions" ADD CONSTRAINT "exceptions_asked_of_fk" FOREIGN KEY ("hospital_id","asked_of") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exceptions" ADD CONSTRAINT "exceptions_recorded_by_fk" FOREIGN KEY ("hospital_id","recorded_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exceptions" ADD CONSTRAINT "exceptions_read_back_to_fk" FOREIGN KEY ("hospital_id","read_back_to") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "exceptions" ADD CONSTRAINT "exceptions_countersigned_by_fk" FOREIGN KEY ("hospital_id","countersigned_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "seen_figures" ADD CONSTRAINT "seen_figures_version_fk" FOREIGN KEY ("hospital_id","version_id") REFERENCES "public"."order_versions"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "seen_figures" ADD CONSTRAINT "seen_figures_account_fk" FOREIGN KEY ("hospital_id","account_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "children" ADD CONSTRAINT "children_hospital_id_hospitals_id_fk" FOREIGN KEY ("hospital_id") REFERENCES "public"."hospitals"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "children" ADD CONSTRAINT "children_registered_by_fk" FOREIGN KEY ("hospital_id","registered_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fluid_plans" ADD CONSTRAINT "fluid_plans_child_fk" FOREIGN KEY ("hospital_id","child_id") REFERENCES "public"."children"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fluid_plans" ADD CONSTRAINT "fluid_plans_by_fk" FOREIGN KEY ("hospital_id","by_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fluid_plans" ADD CONSTRAINT "fluid_plans_ended_by_fk" FOREIGN KEY ("hospital_id","ended_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "intakes" ADD CONSTRAINT "intakes_child_fk" FOREIGN KEY ("hospital_id","child_id") REFERENCES "public"."children"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "intakes" ADD CONSTRAINT "intakes_by_fk" FOREIGN KEY ("hospital_id","by_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "intakes" ADD CONSTRAINT "intakes_superseded_by_fk" FOREIGN KEY ("hospital_id","superseded_by") REFERENCES "public"."intakes"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "results" ADD CONSTRAINT "results_child_fk" FOREIGN KEY ("hospital_id","child_id") REFERENCES "public"."children"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "results" ADD CONSTRAINT "results_by_fk" FOREIGN KEY ("hospital_id","by_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "results" ADD CONSTRAINT "results_superseded_by_fk" FOREIGN KEY ("hospital_id","superseded_by") REFERENCES "public"."results"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stays" ADD CONSTRAINT "stays_child_fk" FOREIGN KEY ("hospital_id","child_id") REFERENCES "public"."children"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stays" ADD CONSTRAINT "stays_ward_fk" FOREIGN KEY ("hospital_id","ward_id") REFERENCES "public"."wards"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "wards" ADD CONSTRAINT "wards_hospital_id_hospitals_id_fk" FOREIGN KEY ("hospital_id") REFERENCES "public"."hospitals"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "near_misses" ADD CONSTRAINT "near_misses_child_fk" FOREIGN KEY ("hospital_id","child_id") REFERENCES "public"."children"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "near_misses" ADD CONSTRAINT "near_misses_version_fk" FOREIGN KEY ("hospital_id","version_id") REFERENCES "public"."order_versions"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "near_misses" ADD CONSTRAINT "near_misses_by_fk" FOREIGN KEY ("hospital_id","by_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "drafts" ADD CONSTRAINT "drafts_version_fk" FOREIGN KEY ("hospital_id","version_id") REFERENCES "public"."order_versions"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_versions" ADD CONSTRAINT "order_versions_order_fk" FOREIGN KEY ("hospital_id","order_id","child_id","kind") REFERENCES "public"."orders"("hospital_id","id","child_id","kind") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_versions" ADD CONSTRAINT "order_versions_author_fk" FOREIGN KEY ("hospital_id","author_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_versions" ADD CONSTRAINT "order_versions_asked_checker_fk" FOREIGN KEY ("hospital_id","asked_checker") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_versions" ADD CONSTRAINT "order_versions_product_fk" FOREIGN KEY ("hospital_id","product_id") REFERENCES "public"."products"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "order_versions" ADD CONSTRAINT "order_versions_weight_fk" FOREIGN KEY ("hospital_id","weight_id") REFERENCES "public"."weights"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "orders" ADD CONSTRAINT "orders_child_fk" FOREIGN KEY ("hospital_id","child_id") REFERENCES "public"."children"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "orders" ADD CONSTRAINT "orders_follows_fk" FOREIGN KEY ("hospital_id","follows") REFERENCES "public"."orders"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "orders" ADD CONSTRAINT "orders_made_by_fk" FOREIGN KEY ("hospital_id","made_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "answers" ADD CONSTRAINT "answers_account_fk" FOREIGN KEY ("hospital_id","account_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "outbox" ADD CONSTRAINT "outbox_to_account_fk" FOREIGN KEY ("hospital_id","to_account") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rulebooks" ADD CONSTRAINT "rulebooks_hospital_id_hospitals_id_fk" FOREIGN KEY ("hospital_id") REFERENCES "public"."hospitals"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rulebooks" ADD CONSTRAINT "rulebooks_drafted_by_fk" FOREIGN KEY ("hospital_id","drafted_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "rulebooks" ADD CONSTRAINT "rulebooks_approved_by_fk" FOREIGN KEY ("hospital_id","approved_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "products" ADD CONSTRAINT "products_hospital_id_hospitals_id_fk" FOREIGN KEY ("hospital_id") REFERENCES "public"."hospitals"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signatures" ADD CONSTRAINT "signatures_version_fk" FOREIGN KEY ("hospital_id","version_id") REFERENCES "public"."order_versions"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signatures" ADD CONSTRAINT "signatures_rulebook_fk" FOREIGN KEY ("hospital_id","rulebook_id") REFERENCES "public"."rulebooks"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signatures" ADD CONSTRAINT "signatures_exception_fk" FOREIGN KEY ("hospital_id","exception_id") REFERENCES "public"."exceptions"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signatures" ADD CONSTRAINT "signatures_by_fk" FOREIGN KEY ("hospital_id","by_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heights" ADD CONSTRAINT "heights_child_fk" FOREIGN KEY ("hospital_id","child_id") REFERENCES "public"."children"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heights" ADD CONSTRAINT "heights_by_fk" FOREIGN KEY ("hospital_id","by_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "heights" ADD CONSTRAINT "heights_superseded_by_fk" FOREIGN KEY ("hospital_id","superseded_by") REFERENCES "public"."heights"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weights" ADD CONSTRAINT "weights_child_fk" FOREIGN KEY ("hospital_id","child_id") REFERENCES "public"."children"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weights" ADD CONSTRAINT "weights_by_fk" FOREIGN KEY ("hospital_id","by_id") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weights" ADD CONSTRAINT "weights_second_by_fk" FOREIGN KEY ("hospital_id","second_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weights" ADD CONSTRAINT "weights_confirmed_by_fk" FOREIGN KEY ("hospital_id","confirmed_by") REFERENCES "public"."accounts"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "weights" ADD CONSTRAINT "weights_superseded_by_fk" FOREIGN KEY ("hospital_id","superseded_by") REFERENCES "public"."weights"("hospital_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "memberships_ward" ON "memberships" USING btree ("hospital_id","ward_id");--> statement-breakpoint
CREATE UNIQUE INDEX "logins_email" ON "auth"."logins" USING btree (lower("email"));--> statement-breakpoint
CREATE INDEX "one_time_tokens_login" ON "auth"."one_time_tokens" USING btree ("login_id");--> statement-breakpoint
CREATE INDEX "sessions_login" ON "auth"."sessions" USING btree ("login_id");--> statement-breakpoint
CREATE INDEX "sessions_absolute_until" ON "auth"."sessions" USING btree ("absolute_until");--> statement-breakpoint
CREATE INDEX "infusion_events_infusion" ON "infusion_events" USING btree ("hospital_id","infusion_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "infusions_one_per_line" ON "infusions" USING btree ("hospital_id","child_id","line") WHERE "infusions"."ended_at" is null;--> statement-breakpoint
CREATE INDEX "infusions_child" ON "infusions" USING btree ("hospital_id","child_id","started_at");--> statement-breakpoint
CREATE INDEX "prints_version" ON "prints" USING btree ("hospital_id","version_id");--> statement-breakpoint
CREATE UNIQUE INDEX "checks_one_agreed" ON "checks" USING btree ("hospital_id","version_id") WHERE "checks"."state" in ('locked-agreed', 'agreed');--> statement-breakpoint
CREATE INDEX "checks_checker" ON "checks" USING btree ("hospital_id","checker_id","state");--> statement-breakpoint
CREATE UNIQUE INDEX "exceptions_one_open" ON "exceptions" USING btree ("hospital_id","version_id","limit_code","content_sha256") WHERE "exceptions"."state" in ('asked', 'granted');--> statement-breakpoint
CREATE INDEX "exceptions_asked" ON "exceptions" USING btree ("hospital_id","asked_at") WHERE "exceptions"."state" = 'asked';--> statement-breakpoint
CREATE INDEX "exceptions_countersign" ON "exceptions" USING btree ("hospital_id","countersign_due_at") WHERE "exceptions"."countersign_due_at" is not null and "exceptions"."countersigned_at" is null;--> statement-breakpoint
CREATE INDEX "children_surname_key" ON "children" USING btree ("hospital_id","surname_key");--> statement-breakpoint
CREATE UNIQUE INDEX "fluid_plans_one_open" ON "fluid_plans" USING btree ("hospital_id","child_id") WHERE "fluid_plans"."ended_at" is null;--> statement-breakpoint
CREATE INDEX "intakes_child" ON "intakes" USING btree ("hospital_id","child_id","at");--> statement-breakpoint
CREATE INDEX "results_latest" ON "results" USING btree ("hospital_id","child_id","analyte","at");--> statement-breakpoint
CREATE UNIQUE INDEX "stays_one_open" ON "stays" USING btree ("hospital_id","child_id") WHERE "stays"."to_at" is null;--> statement-breakpoint
CREATE INDEX "stays_open_by_ward" ON "stays" USING btree ("hospital_id","ward_id") WHERE "stays"."to_at" is null;--> statement-breakpoint
CREATE INDEX "stays_child" ON "stays" USING btree ("hospital_id","child_id","from_at");--> statement-breakpoint
CREATE INDEX "ledger_subject" ON "ledger" USING btree ("hospital_id","subject_id","seq");--> statement-breakpoint
CREATE INDEX "ledger_child" ON "ledger" USING btree ("hospital_id","child_id","seq");--> statement-breakpoint
CREATE INDEX "ledger_actor" ON "ledger" USING btree ("hospital_id","actor_id","seq");--> statement-breakpoint
CREATE INDEX "ledger_act" ON "ledger" USING btree ("hospital_id","act","seq");--> statement-breakpoint
CREATE INDEX "ledger_code" ON "ledger" USING btree ("hospital_id","code","seq");--> statement-breakpoint
CREATE INDEX "ledger_at" ON "ledger" USING btree ("hospital_id","at");--> statement-breakpoint
CREATE INDEX "near_misses_at" ON "near_misses" USING btree ("hospital_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "order_versions_one_live" ON "order_versions" USING btree ("hospital_id","order_id") WHERE live;--> statement-breakpoint
CREATE INDEX "order_versions_live_by_child" ON "order_versions" USING btree ("hospital_id","child_id","state") WHERE live;--> statement-breakpoint
CREATE INDEX "order_versions_queue" ON "order_versions" USING btree ("hospital_id","state","check_due_at") WHERE live;--> statement-breakpoint
CREATE INDEX "order_versions_by_child" ON "order_versions" USING btree ("hospital_id","child_id","signed_at");--> statement-breakpoint
CREATE INDEX "orders_child" ON "orders" USING btree ("hospital_id","child_id","made_at");--> statement-breakpoint
CREATE INDEX "answers_at" ON "answers" USING btree ("hospital_id","at");--> statement-breakpoint
CREATE INDEX "outbox_due" ON "outbox" USING btree ("hospital_id","due_at") WHERE "outbox"."state" = 'due';--> statement-breakpoint
CREATE INDEX "outbox_dead" ON "outbox" USING btree ("hospital_id","made_at") WHERE "outbox"."state" = 'dead';--> statement-breakpoint
CREATE UNIQUE INDEX "rulebooks_one_in_force" ON "rulebooks" USING btree ("hospital_id") WHERE "rulebooks"."state" = 'in-force';--> statement-breakpoint
CREATE UNIQUE INDEX "signatures_once" ON "signatures" USING btree ("hospital_id","version_id","meaning") WHERE "signatures"."version_id" is not null and "signatures"."exception_id" is null and "signatures"."meaning" <> 'witness';--> statement-breakpoint
CREATE UNIQUE INDEX "signatures_rulebook_once" ON "signatures" USING btree ("hospital_id","rulebook_id","by_id") WHERE "signatures"."rulebook_id" is not null;--> statement-breakpoint
CREATE INDEX "signatures_by" ON "signatures" USING btree ("hospital_id","by_id","at");--> statement-breakpoint
CREATE INDEX "heights_latest" ON "heights" USING btree ("hospital_id","child_id","at");--> statement-breakpoint
CREATE INDEX "weights_latest" ON "weights" USING btree ("hospital_id","child_id","at");--> statement-breakpoint
CREATE POLICY "own_hospital" ON "accounts" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "memberships" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "infusion_events" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "infusions" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "prints" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "by_code" ON "prints" AS PERMISSIVE FOR SELECT TO public USING (code = nullif(current_setting('app.print_code', true), ''));--> statement-breakpoint
CREATE POLICY "own_hospital" ON "check_drafts" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "checks" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "exceptions" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "seen_figures" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "children" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "fluid_plans" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "intakes" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "results" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "stays" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "wards" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "ledger" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "ledger_heads" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "near_misses" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "drafts" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "order_counters" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "order_versions" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "orders" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "answers" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "outbox" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "rulebooks" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "products" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "signatures" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "heights" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "own_hospital" ON "weights" AS PERMISSIVE FOR ALL TO public USING (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid) WITH CHECK (hospital_id = nullif(current_setting('app.hospital_id', true), '')::uuid);