/* drag_formulas.h - the formulas behind the table of drag relations: C10, [1],
 * of the neutral 10 m wind. Each is described where it is defined. */
#ifndef LEEWATER_STRESS_DRAG_FORMULAS_H
#define LEEWATER_STRESS_DRAG_FORMULAS_H

#include "leewater/stress.h"

/* Printed as a formula (drag_fits.c). */
double lee_c10_van_dorn_1953(const lee_drag_input *in);
double lee_c10_heaps_1965(const lee_drag_input *in);
double lee_c10_smith_banke_1975(const lee_drag_input *in);
double lee_c10_garratt_linear_1977(const lee_drag_input *in);
double lee_c10_garratt_power_1977(const lee_drag_input *in);
double lee_c10_amorocho_devries_1980(const lee_drag_input *in);
double lee_c10_smith_1980(const lee_drag_input *in);
double lee_c10_large_pond_1981(const lee_drag_input *in);
double lee_c10_wu_1982(const lee_drag_input *in);
double lee_c10_wu_low_wind_1982(const lee_drag_input *in);
double lee_c10_van_dorn_spm_1984(const lee_drag_input *in);
double lee_c10_trenberth_1990(const lee_drag_input *in);
double lee_c10_anderson_1993(const lee_drag_input *in);
double lee_c10_yelland_taylor_1996(const lee_drag_input *in);
double lee_c10_yelland_1998(const lee_drag_input *in);
double lee_c10_wuest_lorke_low_2003(const lee_drag_input *in);
double lee_c10_wuest_lorke_quadratic_2003(const lee_drag_input *in);
double lee_c10_large_yeager_2004(const lee_drag_input *in);
double lee_c10_large_yeager_2009(const lee_drag_input *in);
double lee_c10_andreas_2012(const lee_drag_input *in);
double lee_c10_andreas_lines_2012(const lee_drag_input *in);
double lee_c10_zijlema_2012(const lee_drag_input *in);

/* Solved from a roughness for each speed (drag_solved.c). */
double lee_c10_charnock_rough_1955(const lee_drag_input *in);
double lee_c10_charnock_smooth_1955(const lee_drag_input *in);
double lee_c10_garratt_rough_1977(const lee_drag_input *in);
double lee_c10_garratt_smooth_1977(const lee_drag_input *in);
double lee_c10_smith_rough_1980(const lee_drag_input *in);
double lee_c10_smith_smooth_1980(const lee_drag_input *in);
double lee_c10_wu_rough_1980(const lee_drag_input *in);
double lee_c10_wu_smooth_1980(const lee_drag_input *in);
double lee_c10_smith_rough_1988(const lee_drag_input *in);
double lee_c10_smith_smooth_1988(const lee_drag_input *in);
double lee_c10_zeng_rough_1998(const lee_drag_input *in);
double lee_c10_zeng_smooth_1998(const lee_drag_input *in);
double lee_c10_fairall_2003(const lee_drag_input *in);
double lee_c10_wuest_lorke_2003(const lee_drag_input *in);
double lee_c10_edson_2013(const lee_drag_input *in);

#endif
