CREATE TABLE `accounts` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`user_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`provider` varchar(60) NOT NULL,
	`provider_account_id` varchar(255) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `accounts_id` PRIMARY KEY(`id`),
	CONSTRAINT `accounts_provider_identity` UNIQUE(`provider`,`provider_account_id`)
);
--> statement-breakpoint
CREATE TABLE `department_members` (
	`department_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`user_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`role` enum('owner','instructor','assistant','student') NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `department_members_department_id_user_id_pk` PRIMARY KEY(`department_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `departments` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`name` varchar(300) NOT NULL,
	`slug` varchar(80) NOT NULL,
	`settings` json NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `departments_id` PRIMARY KEY(`id`),
	CONSTRAINT `departments_slug_unique` UNIQUE(`slug`)
);
--> statement-breakpoint
CREATE TABLE `users` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`email` varchar(254) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
	`name` varchar(300) NOT NULL,
	`password_hash` varchar(255),
	`email_verified_at` datetime(3),
	`session_epoch` int NOT NULL DEFAULT 0,
	`preferences` json NOT NULL,
	`deleted_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `users_id` PRIMARY KEY(`id`),
	CONSTRAINT `users_email_unique` UNIQUE(`email`)
);
--> statement-breakpoint
CREATE TABLE `course_members` (
	`course_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`user_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`role` enum('instructor','assistant','student') NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `course_members_course_id_user_id_pk` PRIMARY KEY(`course_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `courses` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`department_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`title` varchar(300) NOT NULL,
	`term` varchar(80) NOT NULL,
	`code` varchar(40) NOT NULL,
	`conventions` json,
	`enrolment_code` varchar(20) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin,
	`archived_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `courses_id` PRIMARY KEY(`id`),
	CONSTRAINT `courses_enrolment_code_unique` UNIQUE(`enrolment_code`)
);
--> statement-breakpoint
CREATE TABLE `invitations` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`department_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`course_id` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`email` varchar(254) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
	`role` enum('owner','instructor','assistant','student') NOT NULL,
	`token_hash` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	`accepted_at` datetime(3),
	`revoked_at` datetime(3),
	`invited_by` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `invitations_id` PRIMARY KEY(`id`),
	CONSTRAINT `invitations_token_hash_unique` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `sign_in_attempts` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`kind` enum('password','link','link_request','enrolment') NOT NULL,
	`email_hash` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`address_hash` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`succeeded` boolean NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `sign_in_attempts_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sign_in_links` (
	`token_hash` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`user_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	`used_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `sign_in_links_token_hash` PRIMARY KEY(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `excerpts` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`score_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`department_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`title` varchar(300) NOT NULL,
	`purpose` text NOT NULL,
	`first_bar` int NOT NULL,
	`last_bar` int NOT NULL,
	`start_tick` int NOT NULL,
	`end_tick` int NOT NULL,
	`created_by` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`deleted_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `excerpts_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `scores` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`department_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`uploaded_by` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`title` varchar(300) NOT NULL,
	`composer` varchar(300) NOT NULL,
	`work` varchar(300) NOT NULL DEFAULT '',
	`source` text NOT NULL,
	`rights` text NOT NULL,
	`file_name` varchar(255) NOT NULL,
	`sha256` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`byte_size` int NOT NULL,
	`state` enum('queued','reading','ready','refused') NOT NULL DEFAULT 'queued',
	`refusal` json,
	`ticks_per_quarter` int,
	`bars` json,
	`note_count` int,
	`key_fifths` tinyint,
	`warnings` json,
	`deleted_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `scores_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `key_regions` (
	`reading_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`start_tick` int NOT NULL,
	`end_tick` int NOT NULL,
	`tonic_fifths` tinyint NOT NULL,
	`mode` enum('major','minor') NOT NULL,
	CONSTRAINT `key_regions_reading_id_start_tick_pk` PRIMARY KEY(`reading_id`,`start_tick`)
);
--> statement-breakpoint
CREATE TABLE `label_alternatives` (
	`label_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`rank` int NOT NULL,
	`key_tonic_fifths` tinyint NOT NULL,
	`key_mode` enum('major','minor') NOT NULL,
	`numeral_text` varchar(60) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin NOT NULL,
	`numeral` json NOT NULL,
	`certainty` double,
	`accepted` boolean NOT NULL DEFAULT false,
	`credit` double,
	CONSTRAINT `label_alternatives_label_id_rank_pk` PRIMARY KEY(`label_id`,`rank`)
);
--> statement-breakpoint
CREATE TABLE `labels` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`reading_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`position` int NOT NULL,
	`start_tick` int NOT NULL,
	`end_tick` int NOT NULL,
	`key_tonic_fifths` tinyint NOT NULL,
	`key_mode` enum('major','minor') NOT NULL,
	`numeral_text` varchar(60) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin,
	`degree_step` tinyint,
	`degree_alter` tinyint,
	`quality` enum('major','minor','diminished','augmented','dominant-seventh','major-seventh','minor-seventh','half-diminished-seventh','diminished-seventh','minor-major-seventh','augmented-major-seventh','augmented-sixth-italian','augmented-sixth-french','augmented-sixth-german','other','dominant-ninth','dominant-minor-ninth','augmented-sixth-swiss','augmented-seventh'),
	`inversion` tinyint,
	`applied_step` tinyint,
	`applied_alter` tinyint,
	`applied_mode` enum('major','minor'),
	`special` enum('cadential-six-four','passing-six-four','pedal-six-four','arpeggiated-six-four','neapolitan','common-tone'),
	`numeral` json,
	`state` enum('suggested','accepted','changed') NOT NULL,
	`certainty` double,
	`asked` boolean NOT NULL DEFAULT true,
	CONSTRAINT `labels_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `readings` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`excerpt_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`department_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`owner_id` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`kind` enum('engine','person','key','submission') NOT NULL,
	`title` varchar(300) NOT NULL,
	`state` enum('proposing','open','settled','failed') NOT NULL DEFAULT 'open',
	`shared` enum('private','comment','edit') NOT NULL DEFAULT 'private',
	`version` int NOT NULL DEFAULT 0,
	`start_tick` int NOT NULL,
	`end_tick` int NOT NULL,
	`based_on` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`deleted_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `readings_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `remarks` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`reading_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`label_id` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`bar_index` int,
	`thread_id` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`author_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`body` text NOT NULL,
	`resolved_at` datetime(3),
	`resolved_by` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`deleted_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `remarks_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `revisions` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`reading_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`version` int NOT NULL,
	`author_id` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`kind` varchar(40) NOT NULL,
	`before` json NOT NULL,
	`after` json NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `revisions_id` PRIMARY KEY(`id`),
	CONSTRAINT `revisions_reading_version` UNIQUE(`reading_id`,`version`)
);
--> statement-breakpoint
CREATE TABLE `share_links` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`department_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`reading_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`token_hash` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`created_by` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`revoked_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `share_links_id` PRIMARY KEY(`id`),
	CONSTRAINT `share_links_token_hash_unique` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `assignments` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`course_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`excerpt_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`key_reading_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`title` varchar(300) NOT NULL,
	`instructions` text NOT NULL,
	`segmentation` enum('given','open') NOT NULL DEFAULT 'given',
	`keys_given` boolean NOT NULL DEFAULT true,
	`points_per_label` double NOT NULL DEFAULT 1,
	`rubric` json NOT NULL,
	`opens_at` datetime(3),
	`due_at` datetime(3),
	`closes_at` datetime(3),
	`attempts` int NOT NULL DEFAULT 1,
	`state` enum('draft','open','closed') NOT NULL DEFAULT 'draft',
	`show_key_after_release` boolean NOT NULL DEFAULT false,
	`created_by` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`deleted_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `assignments_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `marks` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`submission_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`key_label_id` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`start_tick` int NOT NULL,
	`end_tick` int NOT NULL,
	`verdict` varchar(40) NOT NULL,
	`points` double NOT NULL,
	`max_points` double NOT NULL,
	`proposed` json NOT NULL,
	`override_points` double,
	`override_verdict` varchar(40),
	`remark` text,
	`reasons` json NOT NULL,
	`marked_by` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `marks_id` PRIMARY KEY(`id`),
	CONSTRAINT `marks_span` UNIQUE(`submission_id`,`start_tick`)
);
--> statement-breakpoint
CREATE TABLE `submissions` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`assignment_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`student_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`reading_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`attempt` int NOT NULL,
	`state` enum('working','handed_in','marked','released') NOT NULL DEFAULT 'working',
	`handed_in_at` datetime(3),
	`released_at` datetime(3),
	`points` double,
	`max_points` double,
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	CONSTRAINT `submissions_id` PRIMARY KEY(`id`),
	CONSTRAINT `submissions_attempt` UNIQUE(`assignment_id`,`student_id`,`attempt`)
);
--> statement-breakpoint
CREATE TABLE `audit_events` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`department_id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`actor_id` char(36) CHARACTER SET ascii COLLATE ascii_bin,
	`verb` varchar(80) NOT NULL,
	`subject_kind` varchar(40) NOT NULL,
	`subject_id` varchar(80) NOT NULL,
	`details` json NOT NULL,
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `audit_events_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `jobs` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`kind` varchar(60) NOT NULL,
	`payload` json NOT NULL,
	`state` enum('queued','running','done','dead') NOT NULL DEFAULT 'queued',
	`attempts` int NOT NULL DEFAULT 0,
	`max_attempts` int NOT NULL DEFAULT 5,
	`run_after` datetime(3) NOT NULL,
	`leased_until` datetime(3),
	`leased_by` varchar(80),
	`last_error` text,
	`dedupe_key` varchar(160),
	`created_at` datetime(3) NOT NULL,
	`updated_at` datetime(3) NOT NULL,
	`finished_at` datetime(3),
	CONSTRAINT `jobs_id` PRIMARY KEY(`id`),
	CONSTRAINT `jobs_dedupe_key_unique` UNIQUE(`dedupe_key`)
);
--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` char(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`to_address` varchar(254) NOT NULL,
	`subject` varchar(300) NOT NULL,
	`text_body` mediumtext NOT NULL,
	`html_body` mediumtext,
	`state` enum('queued','sent','dead') NOT NULL DEFAULT 'queued',
	`attempts` int NOT NULL DEFAULT 0,
	`max_attempts` int NOT NULL DEFAULT 8,
	`run_after` datetime(3) NOT NULL,
	`leased_until` datetime(3),
	`leased_by` varchar(80),
	`last_error` text,
	`sent_at` datetime(3),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `outbox_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `worker_heartbeats` (
	`worker_id` varchar(80) NOT NULL,
	`seen_at` datetime(3) NOT NULL,
	CONSTRAINT `worker_heartbeats_worker_id` PRIMARY KEY(`worker_id`)
);
--> statement-breakpoint
ALTER TABLE `accounts` ADD CONSTRAINT `accounts_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `department_members` ADD CONSTRAINT `department_members_department_id_departments_id_fk` FOREIGN KEY (`department_id`) REFERENCES `departments`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `department_members` ADD CONSTRAINT `department_members_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `course_members` ADD CONSTRAINT `course_members_course_id_courses_id_fk` FOREIGN KEY (`course_id`) REFERENCES `courses`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `course_members` ADD CONSTRAINT `course_members_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `courses` ADD CONSTRAINT `courses_department_id_departments_id_fk` FOREIGN KEY (`department_id`) REFERENCES `departments`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_department_id_departments_id_fk` FOREIGN KEY (`department_id`) REFERENCES `departments`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_course_id_courses_id_fk` FOREIGN KEY (`course_id`) REFERENCES `courses`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitations` ADD CONSTRAINT `invitations_invited_by_users_id_fk` FOREIGN KEY (`invited_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sign_in_links` ADD CONSTRAINT `sign_in_links_user_id_users_id_fk` FOREIGN KEY (`user_id`) REFERENCES `users`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `excerpts` ADD CONSTRAINT `excerpts_score_id_scores_id_fk` FOREIGN KEY (`score_id`) REFERENCES `scores`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `excerpts` ADD CONSTRAINT `excerpts_department_id_departments_id_fk` FOREIGN KEY (`department_id`) REFERENCES `departments`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `excerpts` ADD CONSTRAINT `excerpts_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `scores` ADD CONSTRAINT `scores_department_id_departments_id_fk` FOREIGN KEY (`department_id`) REFERENCES `departments`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `scores` ADD CONSTRAINT `scores_uploaded_by_users_id_fk` FOREIGN KEY (`uploaded_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `key_regions` ADD CONSTRAINT `key_regions_reading_id_readings_id_fk` FOREIGN KEY (`reading_id`) REFERENCES `readings`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `label_alternatives` ADD CONSTRAINT `label_alternatives_label_id_labels_id_fk` FOREIGN KEY (`label_id`) REFERENCES `labels`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `labels` ADD CONSTRAINT `labels_reading_id_readings_id_fk` FOREIGN KEY (`reading_id`) REFERENCES `readings`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `readings` ADD CONSTRAINT `readings_excerpt_id_excerpts_id_fk` FOREIGN KEY (`excerpt_id`) REFERENCES `excerpts`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `readings` ADD CONSTRAINT `readings_department_id_departments_id_fk` FOREIGN KEY (`department_id`) REFERENCES `departments`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `readings` ADD CONSTRAINT `readings_owner_id_users_id_fk` FOREIGN KEY (`owner_id`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `readings` ADD CONSTRAINT `readings_based_on_readings_id_fk` FOREIGN KEY (`based_on`) REFERENCES `readings`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `remarks` ADD CONSTRAINT `remarks_reading_id_readings_id_fk` FOREIGN KEY (`reading_id`) REFERENCES `readings`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `remarks` ADD CONSTRAINT `remarks_label_id_labels_id_fk` FOREIGN KEY (`label_id`) REFERENCES `labels`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `remarks` ADD CONSTRAINT `remarks_thread_id_remarks_id_fk` FOREIGN KEY (`thread_id`) REFERENCES `remarks`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `remarks` ADD CONSTRAINT `remarks_author_id_users_id_fk` FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `remarks` ADD CONSTRAINT `remarks_resolved_by_users_id_fk` FOREIGN KEY (`resolved_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revisions` ADD CONSTRAINT `revisions_reading_id_readings_id_fk` FOREIGN KEY (`reading_id`) REFERENCES `readings`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revisions` ADD CONSTRAINT `revisions_author_id_users_id_fk` FOREIGN KEY (`author_id`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `share_links` ADD CONSTRAINT `share_links_department_id_departments_id_fk` FOREIGN KEY (`department_id`) REFERENCES `departments`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `share_links` ADD CONSTRAINT `share_links_reading_id_readings_id_fk` FOREIGN KEY (`reading_id`) REFERENCES `readings`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `share_links` ADD CONSTRAINT `share_links_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `assignments` ADD CONSTRAINT `assignments_course_id_courses_id_fk` FOREIGN KEY (`course_id`) REFERENCES `courses`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `assignments` ADD CONSTRAINT `assignments_excerpt_id_excerpts_id_fk` FOREIGN KEY (`excerpt_id`) REFERENCES `excerpts`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `assignments` ADD CONSTRAINT `assignments_key_reading_id_readings_id_fk` FOREIGN KEY (`key_reading_id`) REFERENCES `readings`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `assignments` ADD CONSTRAINT `assignments_created_by_users_id_fk` FOREIGN KEY (`created_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `marks` ADD CONSTRAINT `marks_submission_id_submissions_id_fk` FOREIGN KEY (`submission_id`) REFERENCES `submissions`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `marks` ADD CONSTRAINT `marks_key_label_id_labels_id_fk` FOREIGN KEY (`key_label_id`) REFERENCES `labels`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `marks` ADD CONSTRAINT `marks_marked_by_users_id_fk` FOREIGN KEY (`marked_by`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `submissions` ADD CONSTRAINT `submissions_assignment_id_assignments_id_fk` FOREIGN KEY (`assignment_id`) REFERENCES `assignments`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `submissions` ADD CONSTRAINT `submissions_student_id_users_id_fk` FOREIGN KEY (`student_id`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `submissions` ADD CONSTRAINT `submissions_reading_id_readings_id_fk` FOREIGN KEY (`reading_id`) REFERENCES `readings`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `audit_events` ADD CONSTRAINT `audit_events_department_id_departments_id_fk` FOREIGN KEY (`department_id`) REFERENCES `departments`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `audit_events` ADD CONSTRAINT `audit_events_actor_id_users_id_fk` FOREIGN KEY (`actor_id`) REFERENCES `users`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `accounts_user` ON `accounts` (`user_id`);--> statement-breakpoint
CREATE INDEX `department_members_user` ON `department_members` (`user_id`);--> statement-breakpoint
CREATE INDEX `course_members_user` ON `course_members` (`user_id`);--> statement-breakpoint
CREATE INDEX `courses_department` ON `courses` (`department_id`);--> statement-breakpoint
CREATE INDEX `invitations_department_email` ON `invitations` (`department_id`,`email`);--> statement-breakpoint
CREATE INDEX `sign_in_attempts_email` ON `sign_in_attempts` (`email_hash`,`created_at`);--> statement-breakpoint
CREATE INDEX `sign_in_attempts_address` ON `sign_in_attempts` (`address_hash`,`created_at`);--> statement-breakpoint
CREATE INDEX `sign_in_attempts_created` ON `sign_in_attempts` (`created_at`);--> statement-breakpoint
CREATE INDEX `sign_in_links_user` ON `sign_in_links` (`user_id`);--> statement-breakpoint
CREATE INDEX `excerpts_score` ON `excerpts` (`score_id`);--> statement-breakpoint
CREATE INDEX `excerpts_department` ON `excerpts` (`department_id`,`deleted_at`);--> statement-breakpoint
CREATE INDEX `scores_department` ON `scores` (`department_id`,`deleted_at`,`created_at`);--> statement-breakpoint
CREATE INDEX `scores_department_composer` ON `scores` (`department_id`,`composer`);--> statement-breakpoint
CREATE INDEX `scores_sha256` ON `scores` (`department_id`,`sha256`);--> statement-breakpoint
CREATE INDEX `labels_reading` ON `labels` (`reading_id`,`position`);--> statement-breakpoint
CREATE INDEX `labels_chord` ON `labels` (`quality`,`degree_step`,`degree_alter`,`inversion`,`applied_step`);--> statement-breakpoint
CREATE INDEX `labels_numeral_text` ON `labels` (`numeral_text`);--> statement-breakpoint
CREATE INDEX `readings_excerpt` ON `readings` (`excerpt_id`,`kind`);--> statement-breakpoint
CREATE INDEX `readings_department` ON `readings` (`department_id`);--> statement-breakpoint
CREATE INDEX `readings_owner` ON `readings` (`owner_id`);--> statement-breakpoint
CREATE INDEX `remarks_reading` ON `remarks` (`reading_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `remarks_author` ON `remarks` (`author_id`);--> statement-breakpoint
CREATE INDEX `share_links_reading` ON `share_links` (`reading_id`);--> statement-breakpoint
CREATE INDEX `assignments_course` ON `assignments` (`course_id`);--> statement-breakpoint
CREATE INDEX `assignments_key` ON `assignments` (`key_reading_id`);--> statement-breakpoint
CREATE INDEX `marks_key_label` ON `marks` (`key_label_id`,`verdict`);--> statement-breakpoint
CREATE INDEX `submissions_student` ON `submissions` (`student_id`);--> statement-breakpoint
CREATE INDEX `submissions_reading` ON `submissions` (`reading_id`);--> statement-breakpoint
CREATE INDEX `audit_events_department` ON `audit_events` (`department_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `audit_events_actor` ON `audit_events` (`actor_id`);--> statement-breakpoint
CREATE INDEX `jobs_claim` ON `jobs` (`state`,`run_after`);--> statement-breakpoint
CREATE INDEX `jobs_lease` ON `jobs` (`state`,`leased_until`);--> statement-breakpoint
CREATE INDEX `outbox_claim` ON `outbox` (`state`,`run_after`);