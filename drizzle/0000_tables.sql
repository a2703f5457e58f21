CREATE TABLE `judgements` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`piece_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`by` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`as` enum('instructor','own','second-look','shared','refresh') NOT NULL,
	`seen` enum('whole','holds','piece','photo') NOT NULL,
	`n` int NOT NULL,
	`head` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`outcome` enum('kept','sent-back','mend') NOT NULL,
	`level` tinyint,
	`scales` json,
	`words_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`signer_level` tinyint NOT NULL,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `pk_judgements` PRIMARY KEY(`studio_id`,`id`),
	CONSTRAINT `u_judgements_once` UNIQUE(`studio_id`,`piece_id`,`by`,`as`,`n`)
);
--> statement-breakpoint
CREATE TABLE `marks` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`judgement_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`criterion` varchar(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`says` enum('yes','nearly','no'),
	`value` varchar(24),
	`unit` varchar(8),
	`within` boolean,
	`essential` boolean NOT NULL,
	`photo_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	CONSTRAINT `pk_marks` PRIMARY KEY(`studio_id`,`judgement_id`,`criterion`)
);
--> statement-breakpoint
CREATE TABLE `permission_acts` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`permission` enum('flame','motors','pickle','mill','goods') NOT NULL,
	`lesson_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`act` enum('grant','suspend','lift','limit','withdraw','regain') NOT NULL,
	`limit` varchar(60),
	`by` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`at` datetime(3) NOT NULL,
	`words_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`of` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	CONSTRAINT `pk_permission_acts` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `register` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`seq` int NOT NULL,
	`at` datetime(3) NOT NULL,
	`actor` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`actor_role` varchar(40) NOT NULL,
	`act` varchar(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`object_kind` varchar(30) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`object_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`body` longtext NOT NULL,
	`prev` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`hash` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	CONSTRAINT `pk_register` PRIMARY KEY(`studio_id`,`seq`)
);
--> statement-breakpoint
CREATE TABLE `register_heads` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`seq` int NOT NULL,
	`hash` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	CONSTRAINT `register_heads_studio_id` PRIMARY KEY(`studio_id`)
);
--> statement-breakpoint
CREATE TABLE `sign_off_pieces` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`sign_off_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`judgement_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	CONSTRAINT `pk_sign_off_pieces` PRIMARY KEY(`studio_id`,`sign_off_id`,`judgement_id`)
);
--> statement-breakpoint
CREATE TABLE `sign_offs` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_name_version` int NOT NULL,
	`lesson_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`revision_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`level` tinyint NOT NULL,
	`kind` enum('sign','countersign','correction','refresh','founding') NOT NULL,
	`of` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`by` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`by_name_version` int NOT NULL,
	`by_level` tinyint NOT NULL,
	`at` datetime(3) NOT NULL,
	`on_day` date NOT NULL,
	`digest` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`words_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	CONSTRAINT `pk_sign_offs` PRIMARY KEY(`studio_id`,`id`),
	CONSTRAINT `u_sign_offs_once` UNIQUE(`studio_id`,`of`,`kind`,`by`)
);
--> statement-breakpoint
CREATE TABLE `standings` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`lesson_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`level_signed` tinyint NOT NULL,
	`one_signature` boolean NOT NULL,
	`signed_on` date,
	`sign_off_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`last_piece_on` date,
	`pieces` int NOT NULL,
	`open_piece` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`place_no` int,
	`places` int,
	`waiting_since` datetime(3),
	`sent_back_on` date,
	`revision_read` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`flags` json NOT NULL,
	CONSTRAINT `pk_standings` PRIMARY KEY(`studio_id`,`person_id`,`lesson_id`)
);
--> statement-breakpoint
CREATE TABLE `class_lessons` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`class_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`lesson_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`place` int NOT NULL,
	CONSTRAINT `pk_class_lessons` PRIMARY KEY(`studio_id`,`id`),
	CONSTRAINT `u_class_lessons_lesson` UNIQUE(`studio_id`,`class_id`,`lesson_id`)
);
--> statement-breakpoint
CREATE TABLE `draft_pictures` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`lesson_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`name` varchar(80) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`picture_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	CONSTRAINT `pk_draft_pictures` PRIMARY KEY(`studio_id`,`lesson_id`,`name`)
);
--> statement-breakpoint
CREATE TABLE `drafts` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`lesson_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`source` mediumtext NOT NULL,
	`saved_by` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`saved_at` datetime(3) NOT NULL,
	`base_revision` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`etag` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	CONSTRAINT `pk_drafts` PRIMARY KEY(`studio_id`,`id`),
	CONSTRAINT `u_drafts_lesson` UNIQUE(`studio_id`,`lesson_id`)
);
--> statement-breakpoint
CREATE TABLE `lessons` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`slug` varchar(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`craft` enum('wire','cord','metal','setting','finishing','studio') NOT NULL,
	`owner` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`current_revision` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`put_away_at` datetime(3),
	CONSTRAINT `pk_lessons` PRIMARY KEY(`studio_id`,`id`),
	CONSTRAINT `u_lessons_slug` UNIQUE(`studio_id`,`slug`)
);
--> statement-breakpoint
CREATE TABLE `pictures` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`sha` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`kind` varchar(40) NOT NULL,
	`bytes` int NOT NULL,
	`width` int NOT NULL,
	`height` int NOT NULL,
	CONSTRAINT `pk_pictures` PRIMARY KEY(`studio_id`,`id`),
	CONSTRAINT `u_pictures_sha` UNIQUE(`studio_id`,`sha`)
);
--> statement-breakpoint
CREATE TABLE `revision_acts` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`revision_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`act` enum('into-use','withdrawn','withdrawn-danger','back-in-use') NOT NULL,
	`by` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `pk_revision_acts` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `revision_pictures` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`revision_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`name` varchar(80) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`picture_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`alt` varchar(500) NOT NULL,
	`mirror` tinyint NOT NULL,
	CONSTRAINT `pk_revision_pictures` PRIMARY KEY(`studio_id`,`revision_id`,`name`)
);
--> statement-breakpoint
CREATE TABLE `revision_reads` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`revision_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `pk_revision_reads` PRIMARY KEY(`studio_id`,`revision_id`,`person_id`)
);
--> statement-breakpoint
CREATE TABLE `revisions` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`lesson_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`number` int NOT NULL,
	`source` mediumtext NOT NULL,
	`source_sha` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`compiled` json NOT NULL,
	`compiled_sha` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`format` tinyint NOT NULL,
	`compiler` int NOT NULL,
	`engine` int NOT NULL,
	`title` varchar(200) NOT NULL,
	`effect` enum('first','words','step','standard') NOT NULL,
	`note` varchar(500) NOT NULL,
	`by` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `pk_revisions` PRIMARY KEY(`studio_id`,`id`),
	CONSTRAINT `u_revisions_number` UNIQUE(`studio_id`,`lesson_id`,`number`),
	CONSTRAINT `u_revisions_source` UNIQUE(`studio_id`,`lesson_id`,`source_sha`)
);
--> statement-breakpoint
CREATE TABLE `attempts` (
	`key` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`points` int NOT NULL,
	`ends` datetime(3) NOT NULL,
	CONSTRAINT `attempts_key` PRIMARY KEY(`key`)
);
--> statement-breakpoint
CREATE TABLE `mail` (
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`to_person` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`to_address` varchar(254),
	`kind` enum('invitation','reset','email-change','look-given','judged','signed','second-name','hold-released') NOT NULL,
	`body` json NOT NULL,
	`state` enum('waits','sending','sent','given-up') NOT NULL DEFAULT 'waits',
	`tries` tinyint NOT NULL DEFAULT 0,
	`next_at` datetime(3) NOT NULL,
	`sent_at` datetime(3),
	`dedupe_key` varchar(120),
	CONSTRAINT `mail_id` PRIMARY KEY(`id`),
	CONSTRAINT `u_mail_dedupe` UNIQUE(`dedupe_key`)
);
--> statement-breakpoint
CREATE TABLE `people` (
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`email` varchar(254),
	`email_key` varchar(254),
	`password_hash` varchar(255),
	`epoch` int NOT NULL DEFAULT 0,
	`hand` enum('right','left') NOT NULL DEFAULT 'right',
	`text_size` int NOT NULL DEFAULT 100,
	`ground` enum('paper','grey','peach','dark') NOT NULL DEFAULT 'paper',
	`wants` json NOT NULL,
	`erased_at` datetime(3),
	CONSTRAINT `people_id` PRIMARY KEY(`id`),
	CONSTRAINT `u_people_email` UNIQUE(`email_key`)
);
--> statement-breakpoint
CREATE TABLE `person_names` (
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`version` int NOT NULL,
	`name` varchar(120) NOT NULL,
	`from_at` datetime(3) NOT NULL,
	CONSTRAINT `pk_person_names` PRIMARY KEY(`person_id`,`version`)
);
--> statement-breakpoint
CREATE TABLE `security_log` (
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`at` datetime(3) NOT NULL,
	`person` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`address` varchar(64) NOT NULL,
	`what` varchar(60) NOT NULL,
	CONSTRAINT `security_log_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sessions` (
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`created` datetime(3) NOT NULL,
	`last_seen` datetime(3) NOT NULL,
	`ends` datetime(3) NOT NULL,
	`revoked_at` datetime(3),
	`agent` varchar(200) NOT NULL DEFAULT '',
	CONSTRAINT `sessions_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `tokens` (
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`kind` enum('invite','reset','email','card') NOT NULL,
	`hash` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`email_key` varchar(254),
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`ends` datetime(3) NOT NULL,
	`used_at` datetime(3),
	CONSTRAINT `tokens_id` PRIMARY KEY(`id`),
	CONSTRAINT `u_tokens_hash` UNIQUE(`hash`)
);
--> statement-breakpoint
CREATE TABLE `looks` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`piece_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`turn` varchar(100) CHARACTER SET ascii COLLATE ascii_bin,
	`about` varchar(10) NOT NULL,
	`asked_at` datetime(3) NOT NULL,
	`given_at` datetime(3),
	`by` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	CONSTRAINT `pk_looks` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `notes` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`piece_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`words_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`danger` boolean NOT NULL,
	`at` datetime(3) NOT NULL,
	`shown_at` datetime(3),
	CONSTRAINT `pk_notes` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `photos` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`piece_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`turn` varchar(100) CHARACTER SET ascii COLLATE ascii_bin,
	`for` enum('hold','step','finished','fault','resume') NOT NULL,
	`claimed_sha` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`state` enum('awaited','held','erased') NOT NULL,
	`file_sha` char(64) CHARACTER SET ascii COLLATE ascii_bin,
	`bytes` int NOT NULL,
	`width` int NOT NULL,
	`height` int NOT NULL,
	`has_scale` boolean,
	CONSTRAINT `pk_photos` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `piece_events` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`piece_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`n` int NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`tablet` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`seq` int NOT NULL,
	`round` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`actor` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`kind` varchar(30) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`v` int NOT NULL,
	`at` datetime(3) NOT NULL,
	`since` int,
	`received_at` datetime(3) NOT NULL,
	`clock_off_ms` int NOT NULL,
	`late` boolean NOT NULL,
	`sha` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`body` longtext NOT NULL,
	CONSTRAINT `pk_piece_events` PRIMARY KEY(`studio_id`,`piece_id`,`n`),
	CONSTRAINT `u_piece_events_id` UNIQUE(`studio_id`,`id`),
	CONSTRAINT `u_piece_events_seq` UNIQUE(`studio_id`,`piece_id`,`tablet`,`seq`)
);
--> statement-breakpoint
CREATE TABLE `pieces` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`lesson_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`revision_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`label` varchar(20) NOT NULL,
	`status` enum('at-bench','finished','judged','put-away') NOT NULL,
	`round` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`place` varchar(100) CHARACTER SET ascii COLLATE ascii_bin,
	`turns_done` int NOT NULL,
	`turns_all` int NOT NULL,
	`n` int NOT NULL,
	`head` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`state` json NOT NULL,
	`machine` int NOT NULL,
	`practice` boolean NOT NULL,
	`material` varchar(60) NOT NULL,
	`goods_id` char(26) CHARACTER SET ascii COLLATE ascii_bin,
	`started_at` datetime(3) NOT NULL,
	`finished_at` datetime(3),
	`finished_on` date,
	`waiting_since` datetime(3),
	CONSTRAINT `pk_pieces` PRIMARY KEY(`studio_id`,`id`),
	CONSTRAINT `u_pieces_label` UNIQUE(`studio_id`,`label`)
);
--> statement-breakpoint
CREATE TABLE `readings` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`piece_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`n` int NOT NULL,
	`place` int NOT NULL,
	`turn` varchar(100) CHARACTER SET ascii COLLATE ascii_bin,
	`reading` varchar(31) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`value` decimal(12,4) NOT NULL,
	`unit` varchar(8) NOT NULL,
	`typed` varchar(40) NOT NULL,
	`outside` boolean NOT NULL,
	CONSTRAINT `pk_readings` PRIMARY KEY(`studio_id`,`id`),
	CONSTRAINT `u_readings_event` UNIQUE(`studio_id`,`piece_id`,`n`,`place`)
);
--> statement-breakpoint
CREATE TABLE `set_aside_events` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`piece_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`tablet` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`seq` int NOT NULL,
	`reason` varchar(60) NOT NULL,
	`body` longtext NOT NULL,
	`received_at` datetime(3) NOT NULL,
	CONSTRAINT `pk_set_aside_events` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `words` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`salt` char(64) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`text` varchar(2000) NOT NULL,
	`by` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`at` datetime(3) NOT NULL,
	`erased_at` datetime(3),
	CONSTRAINT `pk_words` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `class_people` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`class_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`from_on` date NOT NULL,
	`until_on` date,
	CONSTRAINT `pk_class_people` PRIMARY KEY(`studio_id`,`class_id`,`person_id`,`from_on`)
);
--> statement-breakpoint
CREATE TABLE `classes` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`name` varchar(120) NOT NULL,
	`term_from` date NOT NULL,
	`term_to` date NOT NULL,
	`weekday` tinyint NOT NULL,
	CONSTRAINT `pk_classes` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `membership_roles` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`role` enum('apprentice','instructor','manager','assessor') NOT NULL,
	`act` enum('given','ended') NOT NULL,
	`by` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`at` datetime(3) NOT NULL,
	CONSTRAINT `pk_membership_roles` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `memberships` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`trail_no` int NOT NULL,
	`age_band` enum('adult','16-17','under-16') NOT NULL DEFAULT 'adult',
	`guardian` longtext,
	`roles` set('apprentice','instructor','manager','assessor') NOT NULL,
	`joined` datetime(3) NOT NULL,
	`left_at` datetime(3),
	CONSTRAINT `pk_memberships` PRIMARY KEY(`studio_id`,`id`),
	CONSTRAINT `u_memberships_person` UNIQUE(`studio_id`,`person_id`),
	CONSTRAINT `u_memberships_trail` UNIQUE(`studio_id`,`trail_no`)
);
--> statement-breakpoint
CREATE TABLE `relations` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_a` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`person_b` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`kind` enum('relative','partner','employer') NOT NULL,
	`declared_on` date NOT NULL,
	CONSTRAINT `pk_relations` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `settings` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`key` varchar(60) NOT NULL,
	`value` json NOT NULL,
	`from_at` datetime(3) NOT NULL,
	`by` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	CONSTRAINT `pk_settings` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
CREATE TABLE `studios` (
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`slug` varchar(60) NOT NULL,
	`name` varchar(120) NOT NULL,
	`zone` varchar(60) NOT NULL,
	`time_made` datetime(3) NOT NULL,
	CONSTRAINT `studios_id` PRIMARY KEY(`id`),
	CONSTRAINT `u_studios_slug` UNIQUE(`slug`)
);
--> statement-breakpoint
CREATE TABLE `tablets` (
	`studio_id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`id` char(26) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
	`name` varchar(40) NOT NULL,
	`secret_hash` char(64) CHARACTER SET ascii COLLATE ascii_bin,
	`enrolled` datetime(3),
	`retired` datetime(3),
	CONSTRAINT `pk_tablets` PRIMARY KEY(`studio_id`,`id`)
);
--> statement-breakpoint
ALTER TABLE `judgements` ADD CONSTRAINT `fk_judgements_piece` FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `pieces`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `judgements` ADD CONSTRAINT `fk_judgements_by` FOREIGN KEY (`studio_id`,`by`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `marks` ADD CONSTRAINT `fk_marks_judgement` FOREIGN KEY (`studio_id`,`judgement_id`) REFERENCES `judgements`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `permission_acts` ADD CONSTRAINT `fk_permission_acts_person` FOREIGN KEY (`studio_id`,`person_id`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sign_off_pieces` ADD CONSTRAINT `fk_sign_off_pieces_sign` FOREIGN KEY (`studio_id`,`sign_off_id`) REFERENCES `sign_offs`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sign_off_pieces` ADD CONSTRAINT `fk_sign_off_pieces_judged` FOREIGN KEY (`studio_id`,`judgement_id`) REFERENCES `judgements`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sign_offs` ADD CONSTRAINT `fk_sign_offs_person` FOREIGN KEY (`studio_id`,`person_id`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sign_offs` ADD CONSTRAINT `fk_sign_offs_lesson` FOREIGN KEY (`studio_id`,`lesson_id`) REFERENCES `lessons`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sign_offs` ADD CONSTRAINT `fk_sign_offs_revision` FOREIGN KEY (`studio_id`,`revision_id`) REFERENCES `revisions`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sign_offs` ADD CONSTRAINT `fk_sign_offs_by` FOREIGN KEY (`studio_id`,`by`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `standings` ADD CONSTRAINT `fk_standings_person` FOREIGN KEY (`studio_id`,`person_id`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `standings` ADD CONSTRAINT `fk_standings_lesson` FOREIGN KEY (`studio_id`,`lesson_id`) REFERENCES `lessons`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `class_lessons` ADD CONSTRAINT `fk_class_lessons_class` FOREIGN KEY (`studio_id`,`class_id`) REFERENCES `classes`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `class_lessons` ADD CONSTRAINT `fk_class_lessons_lesson` FOREIGN KEY (`studio_id`,`lesson_id`) REFERENCES `lessons`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `draft_pictures` ADD CONSTRAINT `fk_draft_pictures_lesson` FOREIGN KEY (`studio_id`,`lesson_id`) REFERENCES `lessons`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `draft_pictures` ADD CONSTRAINT `fk_draft_pictures_picture` FOREIGN KEY (`studio_id`,`picture_id`) REFERENCES `pictures`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `drafts` ADD CONSTRAINT `fk_drafts_lesson` FOREIGN KEY (`studio_id`,`lesson_id`) REFERENCES `lessons`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `lessons` ADD CONSTRAINT `fk_lessons_owner` FOREIGN KEY (`studio_id`,`owner`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_acts` ADD CONSTRAINT `fk_revision_acts_revision` FOREIGN KEY (`studio_id`,`revision_id`) REFERENCES `revisions`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_pictures` ADD CONSTRAINT `fk_revision_pictures_revision` FOREIGN KEY (`studio_id`,`revision_id`) REFERENCES `revisions`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_pictures` ADD CONSTRAINT `fk_revision_pictures_picture` FOREIGN KEY (`studio_id`,`picture_id`) REFERENCES `pictures`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_reads` ADD CONSTRAINT `fk_revision_reads_revision` FOREIGN KEY (`studio_id`,`revision_id`) REFERENCES `revisions`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revision_reads` ADD CONSTRAINT `fk_revision_reads_person` FOREIGN KEY (`studio_id`,`person_id`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revisions` ADD CONSTRAINT `fk_revisions_lesson` FOREIGN KEY (`studio_id`,`lesson_id`) REFERENCES `lessons`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `revisions` ADD CONSTRAINT `fk_revisions_by` FOREIGN KEY (`studio_id`,`by`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `person_names` ADD CONSTRAINT `fk_person_names_person` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `sessions` ADD CONSTRAINT `fk_sessions_person` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `looks` ADD CONSTRAINT `fk_looks_piece` FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `pieces`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `notes` ADD CONSTRAINT `fk_notes_person` FOREIGN KEY (`studio_id`,`person_id`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `photos` ADD CONSTRAINT `fk_photos_piece` FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `pieces`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `piece_events` ADD CONSTRAINT `fk_piece_events_piece` FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `pieces`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `piece_events` ADD CONSTRAINT `fk_piece_events_actor` FOREIGN KEY (`studio_id`,`actor`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `pieces` ADD CONSTRAINT `fk_pieces_person` FOREIGN KEY (`studio_id`,`person_id`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `pieces` ADD CONSTRAINT `fk_pieces_lesson` FOREIGN KEY (`studio_id`,`lesson_id`) REFERENCES `lessons`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `pieces` ADD CONSTRAINT `fk_pieces_revision` FOREIGN KEY (`studio_id`,`revision_id`) REFERENCES `revisions`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `readings` ADD CONSTRAINT `fk_readings_piece` FOREIGN KEY (`studio_id`,`piece_id`) REFERENCES `pieces`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `class_people` ADD CONSTRAINT `fk_class_people_class` FOREIGN KEY (`studio_id`,`class_id`) REFERENCES `classes`(`studio_id`,`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `class_people` ADD CONSTRAINT `fk_class_people_person` FOREIGN KEY (`studio_id`,`person_id`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `classes` ADD CONSTRAINT `fk_classes_studio` FOREIGN KEY (`studio_id`) REFERENCES `studios`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `membership_roles` ADD CONSTRAINT `fk_membership_roles_person` FOREIGN KEY (`studio_id`,`person_id`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `memberships` ADD CONSTRAINT `fk_memberships_studio` FOREIGN KEY (`studio_id`) REFERENCES `studios`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `memberships` ADD CONSTRAINT `fk_memberships_person` FOREIGN KEY (`person_id`) REFERENCES `people`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `relations` ADD CONSTRAINT `fk_relations_a` FOREIGN KEY (`studio_id`,`person_a`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `relations` ADD CONSTRAINT `fk_relations_b` FOREIGN KEY (`studio_id`,`person_b`) REFERENCES `memberships`(`studio_id`,`person_id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `i_judgements_by` ON `judgements` (`studio_id`,`by`,`at`);--> statement-breakpoint
CREATE INDEX `i_permission_acts_person` ON `permission_acts` (`studio_id`,`person_id`,`permission`);--> statement-breakpoint
CREATE INDEX `i_sign_offs_person` ON `sign_offs` (`studio_id`,`person_id`,`lesson_id`);--> statement-breakpoint
CREATE INDEX `i_class_lessons_lesson` ON `class_lessons` (`studio_id`,`lesson_id`);--> statement-breakpoint
CREATE INDEX `i_mail_next` ON `mail` (`state`,`next_at`);--> statement-breakpoint
CREATE INDEX `i_security_log_at` ON `security_log` (`at`);--> statement-breakpoint
CREATE INDEX `i_sessions_person` ON `sessions` (`person_id`);--> statement-breakpoint
CREATE INDEX `i_looks_waiting` ON `looks` (`studio_id`,`given_at`,`asked_at`);--> statement-breakpoint
CREATE INDEX `i_notes_person` ON `notes` (`studio_id`,`person_id`,`shown_at`);--> statement-breakpoint
CREATE INDEX `i_photos_piece` ON `photos` (`studio_id`,`piece_id`);--> statement-breakpoint
CREATE INDEX `i_pieces_waiting` ON `pieces` (`studio_id`,`status`,`waiting_since`);--> statement-breakpoint
CREATE INDEX `i_pieces_person` ON `pieces` (`studio_id`,`person_id`,`lesson_id`);--> statement-breakpoint
CREATE INDEX `i_set_aside_piece` ON `set_aside_events` (`studio_id`,`piece_id`);