CREATE TABLE `material_revisions` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`state` text NOT NULL,
	`title` text NOT NULL,
	`definition` text NOT NULL,
	`definition_hash` text NOT NULL,
	`engine` text NOT NULL,
	`originator_ids` text NOT NULL,
	`reason_for_change` text,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	`changed_at` integer NOT NULL,
	`submitted_at` integer,
	`submitted_by` text,
	`checked_by` text,
	`issued_at` integer,
	`issued_by` text,
	`adopted_at` integer,
	`adopted_by` text,
	`superseded_at` integer,
	`withdrawn_at` integer,
	`withdrawn_by` text,
	`withdrawn_reason` text,
	`withdrawal_date` integer,
	`verify_by` integer,
	`supplied` integer NOT NULL,
	`material_id` text NOT NULL,
	FOREIGN KEY (`material_id`) REFERENCES `materials`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "material_revisions_number" CHECK("material_revisions"."number" >= 1),
	CONSTRAINT "material_revisions_state" CHECK("material_revisions"."state" in ('draft', 'in_check', 'issued', 'superseded', 'withdrawn')),
	CONSTRAINT "material_revisions_definition_json" CHECK(json_valid("material_revisions"."definition")),
	CONSTRAINT "material_revisions_hash_length" CHECK(length("material_revisions"."definition_hash") = 64),
	CONSTRAINT "material_revisions_originators_json" CHECK(json_valid("material_revisions"."originator_ids")),
	CONSTRAINT "material_revisions_submitted" CHECK("material_revisions"."state" = 'draft' or ("material_revisions"."submitted_at" is not null and "material_revisions"."submitted_by" is not null)),
	CONSTRAINT "material_revisions_issued" CHECK("material_revisions"."state" in ('draft', 'in_check') or ("material_revisions"."issued_at" is not null and "material_revisions"."issued_by" is not null and "material_revisions"."checked_by" is not null)),
	CONSTRAINT "material_revisions_checker" CHECK("material_revisions"."supplied" = 1 or "material_revisions"."checked_by" is null or instr("material_revisions"."originator_ids", '"' || "material_revisions"."checked_by" || '"') = 0),
	CONSTRAINT "material_revisions_superseded" CHECK("material_revisions"."state" <> 'superseded' or "material_revisions"."superseded_at" is not null),
	CONSTRAINT "material_revisions_withdrawn" CHECK("material_revisions"."state" <> 'withdrawn' or ("material_revisions"."withdrawn_at" is not null and "material_revisions"."withdrawn_by" is not null and "material_revisions"."withdrawn_reason" is not null)),
	CONSTRAINT "material_revisions_adopted" CHECK(("material_revisions"."adopted_at" is null) = ("material_revisions"."adopted_by" is null))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `material_revisions_number` ON `material_revisions` (`material_id`,`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `material_revisions_one_issued` ON `material_revisions` (`material_id`) WHERE state = 'issued';--> statement-breakpoint
CREATE UNIQUE INDEX `material_revisions_one_open` ON `material_revisions` (`material_id`) WHERE state in ('draft', 'in_check');--> statement-breakpoint
CREATE TABLE `materials` (
	`id` text PRIMARY KEY NOT NULL,
	`slug` text NOT NULL,
	`category` text NOT NULL,
	`last_number` integer NOT NULL,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `materials_slug` ON `materials` (`slug`);--> statement-breakpoint
CREATE INDEX `materials_category` ON `materials` (`category`,`slug`);--> statement-breakpoint
CREATE TABLE `keys` (
	`id` text PRIMARY KEY NOT NULL,
	`lookup` text NOT NULL,
	`secret_version` text NOT NULL,
	`label` text NOT NULL,
	`ending` text NOT NULL,
	`owner_id` text NOT NULL,
	`scopes` text NOT NULL,
	`templates` text,
	`networks` text,
	`defaults_policy` text NOT NULL,
	`rate_per_minute` integer NOT NULL,
	`created_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`revoked_at` integer,
	`last_used_at` integer,
	FOREIGN KEY (`owner_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "keys_lookup_length" CHECK(length("keys"."lookup") = 64),
	CONSTRAINT "keys_order" CHECK("keys"."expires_at" > "keys"."created_at"),
	CONSTRAINT "keys_rate" CHECK("keys"."rate_per_minute" between 1 and 1000000),
	CONSTRAINT "keys_policy" CHECK("keys"."defaults_policy" in ('allow', 'refuse')),
	CONSTRAINT "keys_scopes_json" CHECK(json_valid("keys"."scopes"))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `keys_lookup` ON `keys` (`lookup`);--> statement-breakpoint
CREATE INDEX `keys_owner` ON `keys` (`owner_id`);--> statement-breakpoint
CREATE TABLE `login_attempts` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`account` text NOT NULL,
	`at` integer NOT NULL
);
--> statement-breakpoint
CREATE INDEX `login_attempts_account` ON `login_attempts` (`account`,`at`);--> statement-breakpoint
CREATE INDEX `login_attempts_at` ON `login_attempts` (`at`);--> statement-breakpoint
CREATE TABLE `people` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`role` text NOT NULL,
	`is_admin` integer NOT NULL,
	`password_hash` text,
	`active` integer NOT NULL,
	`created_at` integer NOT NULL,
	CONSTRAINT "people_email_small" CHECK("people"."email" = lower("people"."email")),
	CONSTRAINT "people_role" CHECK("people"."role" in ('reader', 'engineer', 'senior'))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `people_email` ON `people` (`email`);--> statement-breakpoint
CREATE TABLE `rate_windows` (
	`caller` text PRIMARY KEY NOT NULL,
	`window` integer NOT NULL,
	`leased` integer NOT NULL,
	CONSTRAINT "rate_windows_leased" CHECK("rate_windows"."leased" >= 0)
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` text PRIMARY KEY NOT NULL,
	`person_id` text NOT NULL,
	`created_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`last_seen_at` integer NOT NULL,
	`ended_at` integer,
	FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "sessions_order" CHECK("sessions"."expires_at" > "sessions"."created_at")
);
--> statement-breakpoint
CREATE INDEX `sessions_person` ON `sessions` (`person_id`);--> statement-breakpoint
CREATE TABLE `record_tags` (
	`record_number` integer NOT NULL,
	`tag` text NOT NULL,
	PRIMARY KEY(`record_number`, `tag`),
	FOREIGN KEY (`record_number`) REFERENCES `records`(`number`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "record_tags_length" CHECK(length("record_tags"."tag") between 1 and 64)
);
--> statement-breakpoint
CREATE INDEX `record_tags_tag` ON `record_tags` (`tag`,`record_number`);--> statement-breakpoint
CREATE TABLE `record_voids` (
	`record_number` integer PRIMARY KEY NOT NULL,
	`reason` text NOT NULL,
	`by_kind` text NOT NULL,
	`by_id` text NOT NULL,
	`at` integer NOT NULL,
	FOREIGN KEY (`record_number`) REFERENCES `records`(`number`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "record_voids_reason" CHECK(length(trim("record_voids"."reason")) > 0)
);
--> statement-breakpoint
CREATE TABLE `records` (
	`number` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`template_revision_id` text NOT NULL,
	`template` text NOT NULL,
	`revision` integer NOT NULL,
	`definition_hash` text NOT NULL,
	`engine_version` text NOT NULL,
	`node_version` text NOT NULL,
	`given` text NOT NULL,
	`evaluation` text NOT NULL,
	`status` text NOT NULL,
	`title` text NOT NULL,
	`note` text NOT NULL,
	`actor_kind` text NOT NULL,
	`actor_id` text NOT NULL,
	`owner_id` text,
	`digest` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`template_revision_id`) REFERENCES `template_revisions`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`owner_id`) REFERENCES `people`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "records_status" CHECK("records"."status" in ('ok', 'caution', 'stop')),
	CONSTRAINT "records_actor" CHECK("records"."actor_kind" in ('person', 'key', 'system')),
	CONSTRAINT "records_owner_named" CHECK("records"."actor_kind" = 'system' or "records"."owner_id" is not null),
	CONSTRAINT "records_given_json" CHECK(json_valid("records"."given")),
	CONSTRAINT "records_evaluation_json" CHECK(json_valid("records"."evaluation")),
	CONSTRAINT "records_digest_length" CHECK(length("records"."digest") = 64 and length("records"."definition_hash") = 64)
);
--> statement-breakpoint
CREATE INDEX `records_template` ON `records` (`template`,`revision`);--> statement-breakpoint
CREATE INDEX `records_owner` ON `records` (`owner_id`);--> statement-breakpoint
CREATE TABLE `audit` (
	`seq` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`at` integer NOT NULL,
	`actor_kind` text NOT NULL,
	`actor_id` text NOT NULL,
	`action` text NOT NULL,
	`object` text NOT NULL,
	`details` text NOT NULL,
	`previous_hash` text NOT NULL,
	`hash` text NOT NULL,
	`secret_version` text NOT NULL,
	CONSTRAINT "audit_kind" CHECK("audit"."actor_kind" in ('person', 'key', 'system')),
	CONSTRAINT "audit_hash_length" CHECK(length("audit"."hash") = 64 and length("audit"."previous_hash") = 64)
);
--> statement-breakpoint
CREATE INDEX `audit_object` ON `audit` (`object`);--> statement-breakpoint
CREATE TABLE `idempotency` (
	`scope` text NOT NULL,
	`key` text NOT NULL,
	`request_hash` text NOT NULL,
	`state` text NOT NULL,
	`status` integer,
	`location` text,
	`reply` text,
	`created_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	PRIMARY KEY(`scope`, `key`),
	CONSTRAINT "idempotency_state" CHECK("idempotency"."state" in ('running', 'done')),
	CONSTRAINT "idempotency_done" CHECK("idempotency"."state" = 'running' or "idempotency"."status" between 200 and 299)
);
--> statement-breakpoint
CREATE INDEX `idempotency_expires` ON `idempotency` (`expires_at`);--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`payload` text NOT NULL,
	`created_at` integer NOT NULL,
	`due_at` integer NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`last_error` text,
	`sent_at` integer,
	`parked_at` integer,
	CONSTRAINT "outbox_kind" CHECK("outbox"."kind" in ('mail', 'webhook')),
	CONSTRAINT "outbox_payload_json" CHECK(json_valid("outbox"."payload"))
);
--> statement-breakpoint
CREATE INDEX `outbox_due` ON `outbox` (`due_at`) WHERE sent_at is null and parked_at is null;--> statement-breakpoint
CREATE TABLE `settings` (
	`key` text PRIMARY KEY NOT NULL,
	`value` text NOT NULL
);
--> statement-breakpoint
CREATE TABLE `usage_daily` (
	`day` text NOT NULL,
	`caller_kind` text NOT NULL,
	`caller_id` text NOT NULL,
	`template` text NOT NULL,
	`revision` integer NOT NULL,
	`count` integer NOT NULL,
	`last_at` integer NOT NULL,
	PRIMARY KEY(`day`, `caller_kind`, `caller_id`, `template`, `revision`),
	CONSTRAINT "usage_daily_kind" CHECK("usage_daily"."caller_kind" in ('person', 'key', 'system')),
	CONSTRAINT "usage_daily_count" CHECK("usage_daily"."count" > 0)
);
--> statement-breakpoint
CREATE INDEX `usage_daily_template` ON `usage_daily` (`template`,`day`);--> statement-breakpoint
CREATE INDEX `usage_daily_caller` ON `usage_daily` (`caller_kind`,`caller_id`,`last_at`);--> statement-breakpoint
CREATE TABLE `template_revisions` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`state` text NOT NULL,
	`title` text NOT NULL,
	`definition` text NOT NULL,
	`definition_hash` text NOT NULL,
	`engine` text NOT NULL,
	`originator_ids` text NOT NULL,
	`reason_for_change` text,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	`changed_at` integer NOT NULL,
	`submitted_at` integer,
	`submitted_by` text,
	`checked_by` text,
	`issued_at` integer,
	`issued_by` text,
	`adopted_at` integer,
	`adopted_by` text,
	`superseded_at` integer,
	`withdrawn_at` integer,
	`withdrawn_by` text,
	`withdrawn_reason` text,
	`withdrawal_date` integer,
	`verify_by` integer,
	`supplied` integer NOT NULL,
	`template_id` text NOT NULL,
	FOREIGN KEY (`template_id`) REFERENCES `templates`(`id`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "template_revisions_number" CHECK("template_revisions"."number" >= 1),
	CONSTRAINT "template_revisions_state" CHECK("template_revisions"."state" in ('draft', 'in_check', 'issued', 'superseded', 'withdrawn')),
	CONSTRAINT "template_revisions_definition_json" CHECK(json_valid("template_revisions"."definition")),
	CONSTRAINT "template_revisions_hash_length" CHECK(length("template_revisions"."definition_hash") = 64),
	CONSTRAINT "template_revisions_originators_json" CHECK(json_valid("template_revisions"."originator_ids")),
	CONSTRAINT "template_revisions_submitted" CHECK("template_revisions"."state" = 'draft' or ("template_revisions"."submitted_at" is not null and "template_revisions"."submitted_by" is not null)),
	CONSTRAINT "template_revisions_issued" CHECK("template_revisions"."state" in ('draft', 'in_check') or ("template_revisions"."issued_at" is not null and "template_revisions"."issued_by" is not null and "template_revisions"."checked_by" is not null)),
	CONSTRAINT "template_revisions_checker" CHECK("template_revisions"."supplied" = 1 or "template_revisions"."checked_by" is null or instr("template_revisions"."originator_ids", '"' || "template_revisions"."checked_by" || '"') = 0),
	CONSTRAINT "template_revisions_superseded" CHECK("template_revisions"."state" <> 'superseded' or "template_revisions"."superseded_at" is not null),
	CONSTRAINT "template_revisions_withdrawn" CHECK("template_revisions"."state" <> 'withdrawn' or ("template_revisions"."withdrawn_at" is not null and "template_revisions"."withdrawn_by" is not null and "template_revisions"."withdrawn_reason" is not null)),
	CONSTRAINT "template_revisions_adopted" CHECK(("template_revisions"."adopted_at" is null) = ("template_revisions"."adopted_by" is null))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `template_revisions_number` ON `template_revisions` (`template_id`,`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `template_revisions_one_issued` ON `template_revisions` (`template_id`) WHERE state = 'issued';--> statement-breakpoint
CREATE UNIQUE INDEX `template_revisions_one_open` ON `template_revisions` (`template_id`) WHERE state in ('draft', 'in_check');--> statement-breakpoint
CREATE INDEX `template_revisions_hash` ON `template_revisions` (`definition_hash`);--> statement-breakpoint
CREATE TABLE `templates` (
	`id` text PRIMARY KEY NOT NULL,
	`slug` text NOT NULL,
	`category` text NOT NULL,
	`last_number` integer NOT NULL,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `templates_slug` ON `templates` (`slug`);--> statement-breakpoint
CREATE INDEX `templates_category` ON `templates` (`category`,`slug`);