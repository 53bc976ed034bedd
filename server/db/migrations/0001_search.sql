CREATE VIRTUAL TABLE `guide_search` USING fts5(
	`guide_id` UNINDEXED,
	`title`,
	`summary`,
	`words`,
	tokenize = "unicode61 remove_diacritics 2"
);
