ALTER TABLE `snapshot` PARTITION BY RANGE COLUMNS (`at`) (
  PARTITION `before_first` VALUES LESS THAN ('2000-01-01'),
  PARTITION `ahead` VALUES LESS THAN (MAXVALUE)
);--> statement-breakpoint
INSERT INTO `register_revision` (`id`, `revision`) VALUES (1, 0);
