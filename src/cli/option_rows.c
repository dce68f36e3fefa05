/* option_rows.c - the rows that tables of options are made of. */
#include "cli/options.h"
#include "leewater/exposure.h"

const quantity quantity_speed = {"SPEED", "m s-1", 120.0};
const quantity quantity_fetch = {"LENGTH", "m", 2e6};
const quantity quantity_depth = {"DEPTH", "m", 2e3};
const quantity quantity_height = {"HEIGHT", "m", LEE_HIGHEST_MAST};
const quantity quantity_roughness = {"LENGTH", "m", 5.0};
const quantity quantity_duration = {"TIME", "s", 3.2e9};
const quantity quantity_direction = {"ANGLE", "radian", 0.0};
const quantity quantity_density = {"DENSITY", "kg m-3", 2.0};

option flag_option(const char *name, const char *help, bool *target) {
    return (option){
        .kind = OPTION_FLAG, .name = name, .help = help, .target = target};
}

option text_option(const char *name, const char *value, const char *help,
                   const char **target) {
    return (option){.kind = OPTION_TEXT,
                    .name = name,
                    .value = value,
                    .help = help,
                    .target = target};
}

option list_option(const char *name, const char *value, const char *help,
                   option_list *target) {
    return (option){.kind = OPTION_LIST,
                    .name = name,
                    .value = value,
                    .help = help,
                    .target = target};
}

option count_option(const char *name, const char *help, double most,
                    size_t *target) {
    return (option){.kind = OPTION_COUNT,
                    .name = name,
                    .value = "N",
                    .help = help,
                    .most = most,
                    .target = target};
}

option quantity_option(const char *name, const quantity *what, const char *help,
                       double *target) {
    return (option){.kind = OPTION_QUANTITY,
                    .name = name,
                    .value = what->value,
                    .help = help,
                    .unit = what->unit,
                    .most = what->most,
                    .target = target};
}

option positive_option(const char *name, const quantity *what, const char *help,
                       double *target) {
    option row = quantity_option(name, what, help, target);
    row.kind = OPTION_POSITIVE;
    return row;
}

option end_of_options(void) {
    return (option){.kind = OPTION_END};
}

const char *option_name(const option *each) {
    return option_letter(each) != 0 ? each->name + 2 : each->name;
}

char option_letter(const option *each) {
    if (each->name[1] != ',') {
        return '\0';
    }
    return each->name[0];
}
