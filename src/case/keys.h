/* keys.h - the schema of the case file. */
#ifndef LEEWATER_CASE_KEYS_H
#define LEEWATER_CASE_KEYS_H

#include "case/schema.h"

/* The top of the file; reads into a lee_case_draft. */
extern const lee_key_section lee_case_keys;

#endif
