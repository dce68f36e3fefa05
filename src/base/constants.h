/* constants.h - physical constants, each with its unit and source. */
#ifndef LEEWATER_BASE_CONSTANTS_H
#define LEEWATER_BASE_CONSTANTS_H

/* Standard acceleration of gravity, m s-2 (3rd CGPM, 1901). */
static const double lee_standard_gravity = 9.80665;

/* Von Karman's constant, [1] (common practice; see docs/theory.md). */
static const double lee_von_karman = 0.40;

/* Specific gas constant of dry air, J kg-1 K-1 (common practice). */
static const double lee_dry_air_gas_constant = 287.05;

/* 0 degrees Celsius, K (definition). */
static const double lee_celsius_zero = 273.15;

/* Height that every wind is brought to, m (common practice). */
static const double lee_reference_height = 10.0;

/* pi (mathematics). */
static const double lee_pi = 3.14159265358979323846;

#endif
