CREATE TABLE `audit` (
	`id` bigint AUTO_INCREMENT NOT NULL,
	`practice_id` varchar(36) NOT NULL,
	`actor_id` varchar(36),
	`actor_name` varchar(255) NOT NULL,
	`act` varchar(60) NOT NULL,
	`on` varchar(80) NOT NULL,
	`label` varchar(255) NOT NULL DEFAULT '',
	`details` json,
	`address` varchar(64),
	`at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `audit_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `account` (
	`id` varchar(36) NOT NULL,
	`user_id` varchar(36) NOT NULL,
	`account_id` varchar(255) NOT NULL,
	`provider_id` varchar(255) NOT NULL,
	`access_token` text,
	`refresh_token` text,
	`id_token` text,
	`access_token_expires_at` timestamp(3),
	`refresh_token_expires_at` timestamp(3),
	`scope` text,
	`password` text,
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	`updated_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `account_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `invitation` (
	`id` varchar(36) NOT NULL,
	`organization_id` varchar(36) NOT NULL,
	`email` varchar(255) NOT NULL,
	`role` varchar(32),
	`status` varchar(32) NOT NULL DEFAULT 'pending',
	`expires_at` timestamp(3) NOT NULL,
	`inviter_id` varchar(36) NOT NULL,
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `invitation_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `member` (
	`id` varchar(36) NOT NULL,
	`organization_id` varchar(36) NOT NULL,
	`user_id` varchar(36) NOT NULL,
	`role` varchar(32) NOT NULL,
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `member_id` PRIMARY KEY(`id`),
	CONSTRAINT `member_org_user` UNIQUE(`organization_id`,`user_id`)
);
--> statement-breakpoint
CREATE TABLE `organization` (
	`id` varchar(36) NOT NULL,
	`name` varchar(255) NOT NULL,
	`slug` varchar(255) NOT NULL,
	`logo` text,
	`metadata` text,
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `organization_id` PRIMARY KEY(`id`),
	CONSTRAINT `organization_slug` UNIQUE(`slug`)
);
--> statement-breakpoint
CREATE TABLE `rate_limit` (
	`id` varchar(36) NOT NULL,
	`key` varchar(255) NOT NULL,
	`count` int NOT NULL,
	`last_request` bigint NOT NULL,
	CONSTRAINT `rate_limit_id` PRIMARY KEY(`id`),
	CONSTRAINT `rate_limit_key` UNIQUE(`key`)
);
--> statement-breakpoint
CREATE TABLE `session` (
	`id` varchar(36) NOT NULL,
	`user_id` varchar(36) NOT NULL,
	`token` varchar(255) NOT NULL,
	`expires_at` timestamp(3) NOT NULL,
	`ip_address` varchar(64),
	`user_agent` text,
	`active_organization_id` varchar(36),
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	`updated_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `session_id` PRIMARY KEY(`id`),
	CONSTRAINT `session_token` UNIQUE(`token`)
);
--> statement-breakpoint
CREATE TABLE `two_factor` (
	`id` varchar(36) NOT NULL,
	`user_id` varchar(36) NOT NULL,
	`secret` text NOT NULL,
	`backup_codes` text NOT NULL,
	`verified` boolean DEFAULT true,
	`failed_verification_count` int DEFAULT 0,
	`locked_until` timestamp(3),
	CONSTRAINT `two_factor_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `user` (
	`id` varchar(36) NOT NULL,
	`name` varchar(255) NOT NULL,
	`email` varchar(255) NOT NULL,
	`email_verified` boolean NOT NULL DEFAULT false,
	`image` text,
	`two_factor_enabled` boolean DEFAULT false,
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	`updated_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `user_id` PRIMARY KEY(`id`),
	CONSTRAINT `user_email` UNIQUE(`email`)
);
--> statement-breakpoint
CREATE TABLE `verification` (
	`id` varchar(36) NOT NULL,
	`identifier` varchar(255) NOT NULL,
	`value` text NOT NULL,
	`expires_at` timestamp(3) NOT NULL,
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	`updated_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `verification_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `link` (
	`id` varchar(36) NOT NULL,
	`section_id` varchar(36) NOT NULL,
	`token_hash` varchar(64) NOT NULL,
	`label` varchar(200) NOT NULL,
	`created_by` varchar(36) NOT NULL,
	`shows` varchar(16) NOT NULL DEFAULT 'draft',
	`passphrase_hash` varchar(255),
	`expires_at` timestamp(3),
	`revoked_at` timestamp(3),
	`last_used_at` timestamp(3),
	`uses` int NOT NULL DEFAULT 0,
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `link_id` PRIMARY KEY(`id`),
	CONSTRAINT `link_token` UNIQUE(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `outbox` (
	`id` varchar(36) NOT NULL,
	`kind` varchar(40) NOT NULL,
	`to` varchar(255) NOT NULL,
	`subject` varchar(255) NOT NULL,
	`text` mediumtext NOT NULL,
	`html` mediumtext NOT NULL,
	`state` varchar(16) NOT NULL DEFAULT 'waiting',
	`tries` int NOT NULL DEFAULT 0,
	`next_try_at` timestamp(3) NOT NULL DEFAULT (now()),
	`error` text,
	`sent_at` timestamp(3),
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `outbox_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `section` (
	`id` varchar(36) NOT NULL,
	`site_id` varchar(36) NOT NULL,
	`practice_id` varchar(36) NOT NULL,
	`title` varchar(200) NOT NULL,
	`epoch` int NOT NULL DEFAULT 1,
	`created_by` varchar(36) NOT NULL,
	`archived_at` timestamp(3),
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	`updated_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `section_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `section_snapshot` (
	`section_id` varchar(36) NOT NULL,
	`epoch` int NOT NULL,
	`seq` bigint NOT NULL,
	`state` longblob NOT NULL,
	`at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `section_snapshot_section_id_epoch_pk` PRIMARY KEY(`section_id`,`epoch`)
);
--> statement-breakpoint
CREATE TABLE `section_update` (
	`seq` bigint AUTO_INCREMENT NOT NULL,
	`section_id` varchar(36) NOT NULL,
	`epoch` int NOT NULL,
	`update` longblob NOT NULL,
	`user_id` varchar(36),
	`at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `section_update_seq` PRIMARY KEY(`seq`)
);
--> statement-breakpoint
CREATE TABLE `section_version` (
	`id` varchar(36) NOT NULL,
	`section_id` varchar(36) NOT NULL,
	`epoch` int NOT NULL,
	`seq` bigint NOT NULL,
	`kind` varchar(16) NOT NULL,
	`name` varchar(200) NOT NULL DEFAULT '',
	`state` longblob NOT NULL,
	`created_by` varchar(36),
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `section_version_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `section_view` (
	`section_id` varchar(36) NOT NULL,
	`epoch` int NOT NULL,
	`seq` bigint NOT NULL,
	`document` json,
	`thumbnail` mediumtext,
	`readings` json,
	`at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `section_view_section_id` PRIMARY KEY(`section_id`)
);
--> statement-breakpoint
CREATE TABLE `setup` (
	`name` varchar(60) NOT NULL,
	`at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `setup_name` PRIMARY KEY(`name`)
);
--> statement-breakpoint
CREATE TABLE `site` (
	`id` varchar(36) NOT NULL,
	`practice_id` varchar(36) NOT NULL,
	`name` varchar(200) NOT NULL,
	`number` varchar(60) NOT NULL DEFAULT '',
	`place` varchar(200) NOT NULL DEFAULT '',
	`client` varchar(200) NOT NULL DEFAULT '',
	`note` text,
	`owner_id` varchar(36) NOT NULL,
	`archived_at` timestamp(3),
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	`updated_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `site_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `site_share` (
	`site_id` varchar(36) NOT NULL,
	`user_id` varchar(36) NOT NULL,
	`role` varchar(16) NOT NULL,
	`created_by` varchar(36) NOT NULL,
	`created_at` timestamp(3) NOT NULL DEFAULT (now()),
	CONSTRAINT `site_share_site_id_user_id_pk` PRIMARY KEY(`site_id`,`user_id`)
);
--> statement-breakpoint
ALTER TABLE `account` ADD CONSTRAINT `account_user_id_user_id_fk` FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitation` ADD CONSTRAINT `invitation_organization_id_organization_id_fk` FOREIGN KEY (`organization_id`) REFERENCES `organization`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `invitation` ADD CONSTRAINT `invitation_inviter_id_user_id_fk` FOREIGN KEY (`inviter_id`) REFERENCES `user`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `member` ADD CONSTRAINT `member_organization_id_organization_id_fk` FOREIGN KEY (`organization_id`) REFERENCES `organization`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `member` ADD CONSTRAINT `member_user_id_user_id_fk` FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `session` ADD CONSTRAINT `session_user_id_user_id_fk` FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `two_factor` ADD CONSTRAINT `two_factor_user_id_user_id_fk` FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `link` ADD CONSTRAINT `link_section_id_section_id_fk` FOREIGN KEY (`section_id`) REFERENCES `section`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `link` ADD CONSTRAINT `link_created_by_user_id_fk` FOREIGN KEY (`created_by`) REFERENCES `user`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `section` ADD CONSTRAINT `section_site_id_site_id_fk` FOREIGN KEY (`site_id`) REFERENCES `site`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `section` ADD CONSTRAINT `section_practice_id_organization_id_fk` FOREIGN KEY (`practice_id`) REFERENCES `organization`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `section` ADD CONSTRAINT `section_created_by_user_id_fk` FOREIGN KEY (`created_by`) REFERENCES `user`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `section_snapshot` ADD CONSTRAINT `section_snapshot_section_id_section_id_fk` FOREIGN KEY (`section_id`) REFERENCES `section`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `section_update` ADD CONSTRAINT `section_update_section_id_section_id_fk` FOREIGN KEY (`section_id`) REFERENCES `section`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `section_version` ADD CONSTRAINT `section_version_section_id_section_id_fk` FOREIGN KEY (`section_id`) REFERENCES `section`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `section_view` ADD CONSTRAINT `section_view_section_id_section_id_fk` FOREIGN KEY (`section_id`) REFERENCES `section`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `site` ADD CONSTRAINT `site_practice_id_organization_id_fk` FOREIGN KEY (`practice_id`) REFERENCES `organization`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `site` ADD CONSTRAINT `site_owner_id_user_id_fk` FOREIGN KEY (`owner_id`) REFERENCES `user`(`id`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `site_share` ADD CONSTRAINT `site_share_site_id_site_id_fk` FOREIGN KEY (`site_id`) REFERENCES `site`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `site_share` ADD CONSTRAINT `site_share_user_id_user_id_fk` FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `audit_practice` ON `audit` (`practice_id`,`at`);--> statement-breakpoint
CREATE INDEX `audit_actor` ON `audit` (`practice_id`,`actor_id`,`at`);--> statement-breakpoint
CREATE INDEX `account_user` ON `account` (`user_id`);--> statement-breakpoint
CREATE INDEX `invitation_org` ON `invitation` (`organization_id`);--> statement-breakpoint
CREATE INDEX `invitation_email` ON `invitation` (`email`);--> statement-breakpoint
CREATE INDEX `member_user` ON `member` (`user_id`);--> statement-breakpoint
CREATE INDEX `session_user` ON `session` (`user_id`);--> statement-breakpoint
CREATE INDEX `two_factor_user` ON `two_factor` (`user_id`);--> statement-breakpoint
CREATE INDEX `verification_identifier` ON `verification` (`identifier`);--> statement-breakpoint
CREATE INDEX `link_section` ON `link` (`section_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `outbox_due` ON `outbox` (`state`,`next_try_at`);--> statement-breakpoint
CREATE INDEX `outbox_created` ON `outbox` (`created_at`);--> statement-breakpoint
CREATE INDEX `section_site` ON `section` (`site_id`,`archived_at`,`title`);--> statement-breakpoint
CREATE INDEX `section_practice` ON `section` (`practice_id`,`updated_at`);--> statement-breakpoint
CREATE INDEX `section_update_log` ON `section_update` (`section_id`,`epoch`,`seq`);--> statement-breakpoint
CREATE INDEX `section_version_section` ON `section_version` (`section_id`,`created_at`);--> statement-breakpoint
CREATE INDEX `site_practice` ON `site` (`practice_id`,`archived_at`,`name`);--> statement-breakpoint
CREATE INDEX `site_share_user` ON `site_share` (`user_id`);