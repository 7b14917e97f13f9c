/* Made by tests/reference/kt_surfaces.py from the finite-element tables beside it; not to be edited. */
#include "notch/shapes.h"

static const double round_fillet_tension_c[] = {
    0.953600712,  -0.0036504308, 0.267994034,  0.0191868061,  -0.00377740252,
    0.0577856105, -0.597702099,  -0.44488019,  -0.0335011536, 0.264315094,
    0.471141642,  0.206763533,   -0.052451457, -0.111575633,  0.00540657475};
static const double round_fillet_tension_hull[][2] = {
    {0.186226, 0.679867}, {0.246300, 0.106344}, {0.511626, 0.040525},
    {0.633975, 0.040000}, {0.817256, 0.200000}, {0.828944, 0.463757},
    {0.809160, 0.701223}, {0.691618, 0.929105}, {0.378536, 0.931398}};
const nw_kt_surface nw_kt_surface_round_fillet_tension = {.x = nw_ratio_depth_both,
                                                          .corner_exponent = 0.4555,
                                                          .degree = 4,
                                                          .coefficients = round_fillet_tension_c,
                                                          .hull = round_fillet_tension_hull,
                                                          .hull_corners = 9,
                                                          .points = 46,
                                                          .error_percent = 0.6};

static const double round_fillet_bending_c[] = {
    0.635543209, -0.260726327,  0.162372648,   -0.0418826496, -0.00421141195,
    0.225176971, -0.318210639,  -0.214663946,  0.0719506908,  0.0900433211,
    0.216505203, 0.00983830226, -0.0152286433, -0.0304155718, -0.000545832145};
static const double round_fillet_bending_hull[][2] = {
    {0.239318, 0.062880}, {0.453922, 0.028364}, {0.748368, 0.071710}, {0.832886, 0.174266},
    {0.835749, 0.467542}, {0.775385, 0.741692}, {0.691618, 0.929105}, {0.418555, 0.822024},
    {0.316766, 0.729472}, {0.249235, 0.274575}};
const nw_kt_surface nw_kt_surface_round_fillet_bending = {.x = nw_ratio_depth_both,
                                                          .corner_exponent = 0.4555,
                                                          .degree = 4,
                                                          .coefficients = round_fillet_bending_c,
                                                          .hull = round_fillet_bending_hull,
                                                          .hull_corners = 10,
                                                          .points = 27,
                                                          .error_percent = 0.6};

static const double round_fillet_torsion_c[] = {
    0.411509317,   -0.255333595,  0.0435048928,  -0.0321073637, 0.000140555277,
    0.342337981,   -0.170986819,  -0.0233147248, 0.0657933698,  0.12306203,
    0.00835151856, -0.0467171553, 0.0386780183,  0.0280867159,  0.00576391891};
static const double round_fillet_torsion_hull[][2] = {
    {0.249235, 0.274575}, {0.286888, 0.082993}, {0.453922, 0.028364}, {0.748368, 0.071710},
    {0.827107, 0.416024}, {0.828944, 0.463757}, {0.809160, 0.701223}, {0.691618, 0.929105},
    {0.597765, 0.943959}, {0.526393, 0.949265}, {0.495988, 0.937730}, {0.362222, 0.836211}};
const nw_kt_surface nw_kt_surface_round_fillet_torsion = {.x = nw_ratio_depth_both,
                                                          .corner_exponent = 0.3333333333,
                                                          .degree = 4,
                                                          .coefficients = round_fillet_torsion_c,
                                                          .hull = round_fillet_torsion_hull,
                                                          .hull_corners = 12,
                                                          .points = 31,
                                                          .error_percent = 0.7};

static const double round_groove_tension_c[] = {
    1.27190123,  -0.228156729, 0.45103425,    -0.0313678706, 0.0100082703,
    0.104886078, -0.868025511, -0.461320266,  0.0228301274,  0.297886834,
    0.58913212,  0.176614536,  -0.0803957491, -0.120328392,  0.00847083682};
static const double round_groove_tension_hull[][2] = {
    {0.186226, 0.679867}, {0.189478, 0.341335}, {0.239318, 0.062880},
    {0.453922, 0.028364}, {0.789482, 0.061431}, {0.857262, 0.179336},
    {0.852599, 0.802726}, {0.495988, 0.937730}, {0.238817, 0.932491}};
const nw_kt_surface nw_kt_surface_round_groove_tension = {.x = nw_ratio_depth_both,
                                                          .corner_exponent = 0.5,
                                                          .degree = 4,
                                                          .coefficients = round_groove_tension_c,
                                                          .hull = round_groove_tension_hull,
                                                          .hull_corners = 9,
                                                          .points = 64,
                                                          .error_percent = 1.1};

static const double round_groove_bending_c[] = {
    0.876195252,  -0.479846527, 0.294385957, -0.107604991, 0.176055097,
    -0.577630624, -0.201938162, 0.126155809, 0.237021376,  -0.061991416};
static const double round_groove_bending_hull[][2] = {
    {0.186226, 0.679867}, {0.239318, 0.062880}, {0.748368, 0.071710}, {0.809160, 0.701223},
    {0.775385, 0.741692}, {0.618591, 0.888089}, {0.495988, 0.937730}, {0.378536, 0.931398}};
const nw_kt_surface nw_kt_surface_round_groove_bending = {.x = nw_ratio_depth_both,
                                                          .corner_exponent = 0.5,
                                                          .degree = 3,
                                                          .coefficients = round_groove_bending_c,
                                                          .hull = round_groove_bending_hull,
                                                          .hull_corners = 8,
                                                          .points = 30,
                                                          .error_percent = 1.0};

static const double round_groove_torsion_c[] = {
    0.384264161,  -0.315632691,  0.129372702,   -0.0600112202, 0.0206327602,
    0.333165671,  -0.186291393,  -0.0296724313, 0.0850697741,  -0.0340496124,
    0.0339506971, -0.0288461814, 0.0397789616,  0.00568971958, -0.0175316133};
static const double round_groove_torsion_hull[][2] = {
    {0.186226, 0.679867}, {0.239318, 0.062880}, {0.272512, 0.021412},
    {0.453922, 0.028364}, {0.789482, 0.061431}, {0.832886, 0.174266},
    {0.840657, 0.917040}, {0.597765, 0.943959}, {0.238817, 0.932491}};
const nw_kt_surface nw_kt_surface_round_groove_torsion = {.x = nw_ratio_depth_both,
                                                          .corner_exponent = 0.5,
                                                          .degree = 4,
                                                          .coefficients = round_groove_torsion_c,
                                                          .hull = round_groove_torsion_hull,
                                                          .hull_corners = 9,
                                                          .points = 53,
                                                          .error_percent = 1.5};

static const double flat_fillet_tension_c[] = {
    0.979726162, -0.18939123,  0.126919066,   0.00149386908, -0.00187904291,
    0.290649795, -0.151682875, -0.249982299,  -0.0877066717, 0.124683724,
    0.196615433, 0.179901863,  0.00949733939, -0.0480883785, 0.00728026306};
static const double flat_fillet_tension_hull[][2] = {
    {0.246300, 0.106344}, {0.272512, 0.021412}, {0.453922, 0.028364}, {0.666667, 0.100000},
    {0.832886, 0.174266}, {0.840657, 0.917040}, {0.526393, 0.949265}, {0.378536, 0.931398},
    {0.335376, 0.826040}, {0.249235, 0.274575}};
const nw_kt_surface nw_kt_surface_flat_fillet_tension = {.x = nw_ratio_depth_both,
                                                         .corner_exponent = 0.4555,
                                                         .degree = 4,
                                                         .coefficients = flat_fillet_tension_c,
                                                         .hull = flat_fillet_tension_hull,
                                                         .hull_corners = 10,
                                                         .points = 44,
                                                         .error_percent = 1.0};

static const double flat_fillet_bending_c[] = {
    0.686691754,  -0.228069678, 0.147006156,  -0.00782441731, 0.251867546,
    -0.300404153, -0.227122065, 0.0537156684, 0.188340517,    0.0121450914};
static const double flat_fillet_bending_hull[][2] = {
    {0.242076, 0.413150}, {0.249235, 0.274575}, {0.306369, 0.131829}, {0.453922, 0.028364},
    {0.666667, 0.100000}, {0.832886, 0.174266}, {0.840657, 0.917040}, {0.597765, 0.943959},
    {0.526393, 0.949265}, {0.378536, 0.931398}, {0.333846, 0.844790}};
const nw_kt_surface nw_kt_surface_flat_fillet_bending = {.x = nw_ratio_depth_both,
                                                         .corner_exponent = 0.4555,
                                                         .degree = 3,
                                                         .coefficients = flat_fillet_bending_c,
                                                         .hull = flat_fillet_bending_hull,
                                                         .hull_corners = 11,
                                                         .points = 49,
                                                         .error_percent = 0.7};

static const double flat_notches_tension_c[] = {
    1.52420919,  -0.232896126, 0.41363992,    0.0194371861, 0.00473103334,
    0.110090756, -0.829181651, -0.523578398,  -0.107600585, 0.357560607,
    0.538816872, 0.292127551,  -0.0735121628, -0.135327861, 0.0297945913};
static const double flat_notches_tension_hull[][2] = {
    {0.229953, 0.488232}, {0.239318, 0.062880}, {0.453922, 0.028364}, {0.511626, 0.040525},
    {0.666667, 0.100000}, {0.832886, 0.174266}, {0.835749, 0.467542}, {0.775385, 0.741692},
    {0.691618, 0.929105}, {0.526393, 0.949265}, {0.372566, 0.897075}, {0.333846, 0.844790}};
const nw_kt_surface nw_kt_surface_flat_notches_tension = {.x = nw_ratio_depth_both,
                                                          .corner_exponent = 0.5,
                                                          .degree = 4,
                                                          .coefficients = flat_notches_tension_c,
                                                          .hull = flat_notches_tension_hull,
                                                          .hull_corners = 12,
                                                          .points = 47,
                                                          .error_percent = 0.7};

static const double flat_notches_bending_c[] = {
    1.00712896,  -0.467800386,  0.296256843,   -0.104772762,  0.0399193864,
    0.355711026, -0.18023984,   -0.0230618558, 0.195134548,   0.135411225,
    0.282558568, -0.0135208496, -0.0396150605, 0.00706949719, 0.00152690323};
static const double flat_notches_bending_hull[][2] = {
    {0.229953, 0.488232}, {0.272512, 0.021412}, {0.453922, 0.028364},
    {0.748368, 0.071710}, {0.835749, 0.467542}, {0.809160, 0.701223},
    {0.597765, 0.943959}, {0.378536, 0.931398}, {0.333846, 0.844790}};
const nw_kt_surface nw_kt_surface_flat_notches_bending = {.x = nw_ratio_depth_both,
                                                          .corner_exponent = 0.5,
                                                          .degree = 4,
                                                          .coefficients = flat_notches_bending_c,
                                                          .hull = flat_notches_bending_hull,
                                                          .hull_corners = 9,
                                                          .points = 44,
                                                          .error_percent = 1.1};

static const double edge_notch_tension_c[] = {
    0.204743272, -0.677790745, 0.134975964, -0.228235267,  0.0874629377,
    0.882783827, 0.11617846,   0.326898836, 0.309875277,   -0.719545335,
    0.12620584,  -0.200659511, 0.129650807, -0.0119144223, -0.236456695};
static const double edge_notch_tension_hull[][2] = {
    {0.186226, 0.679867}, {0.239318, 0.062880}, {0.272512, 0.021412}, {0.748368, 0.071710},
    {0.797391, 0.343207}, {0.703130, 0.725146}, {0.618591, 0.888089}, {0.362222, 0.836211}};
const nw_kt_surface nw_kt_surface_edge_notch_tension = {.x = nw_ratio_depth_one,
                                                        .corner_exponent = 0.5,
                                                        .degree = 4,
                                                        .coefficients = edge_notch_tension_c,
                                                        .hull = edge_notch_tension_hull,
                                                        .hull_corners = 8,
                                                        .points = 28,
                                                        .error_percent = 1.6};

static const double edge_notch_gross_line_c[] = {
    0.711090087, -0.428177672,  0.333767518,  -0.140179882,  0.0736227155,
    0.585752112, -0.232453136,  0.0672826851, 0.225772398,   -0.0688648992,
    0.309806244, -0.0160919026, 0.0463848431, -0.0372194346, -0.058701525};
static const double edge_notch_gross_line_hull[][2] = {
    {0.186226, 0.679867}, {0.239318, 0.062880}, {0.272512, 0.021412}, {0.511626, 0.040525},
    {0.748368, 0.071710}, {0.832886, 0.174266}, {0.828944, 0.463757}, {0.780526, 0.667156},
    {0.597765, 0.943959}, {0.378536, 0.931398}};
const nw_kt_surface nw_kt_surface_edge_notch_gross_line = {.x = nw_ratio_depth_one,
                                                           .corner_exponent = 0.5,
                                                           .degree = 4,
                                                           .coefficients = edge_notch_gross_line_c,
                                                           .hull = edge_notch_gross_line_hull,
                                                           .hull_corners = 10,
                                                           .points = 45,
                                                           .error_percent = 2.2};

static const double edge_notch_bending_c[] = {
    0.680111094, -0.632360439, 0.19160865,   -0.157924144, 0.0347739819,
    0.52474971,  0.111536369,  0.0380711988, 0.222476788,  -0.0935277833,
    0.141154828, -0.148936073, 0.0213939658, 0.161007599,  -0.0376270465};
static const double edge_notch_bending_hull[][2] = {
    {0.186226, 0.679867}, {0.239318, 0.062880}, {0.272512, 0.021412}, {0.748368, 0.071710},
    {0.835749, 0.467542}, {0.775385, 0.741692}, {0.691618, 0.929105}, {0.372566, 0.897075}};
const nw_kt_surface nw_kt_surface_edge_notch_bending = {.x = nw_ratio_depth_one,
                                                        .corner_exponent = 0.5,
                                                        .degree = 4,
                                                        .coefficients = edge_notch_bending_c,
                                                        .hull = edge_notch_bending_hull,
                                                        .hull_corners = 8,
                                                        .points = 47,
                                                        .error_percent = 2.8};
