/* leewater.h - wind set-up on lakes and reservoirs: the whole library.
 *
 * The numbers are planning estimates. Flood warnings and decisions rest with
 * the local authorities; design is for licensed practice under local codes.
 *
 * The library never prints (but to streams it is handed), exits, aborts,
 * reads the environment or sets the locale. It uses GSL, whose default is to
 * abort on errors: call lee_quiet_gsl() (or gsl_set_error_handler_off()) once
 * at the start of an embedding program. */
#ifndef LEEWATER_LEEWATER_H
#define LEEWATER_LEEWATER_H

#include "leewater/basin.h"
#include "leewater/calendar.h"
#include "leewater/case.h"
#include "leewater/exposure.h"
#include "leewater/output.h"
#include "leewater/series.h"
#include "leewater/setup.h"
#include "leewater/status.h"
#include "leewater/stress.h"
#include "leewater/units.h"
#include "leewater/wind.h"

#endif
