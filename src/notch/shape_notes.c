/* Cautions that several loads carry. */
#include "notch/shapes.h"

const char nw_note_shear[] =
    "Nominal and local stress are shear stresses. The principal stress at the root has the same "
    "size, with an equal compression across it: uniaxial strain-life data need an equivalent "
    "stress (von Mises: sqrt(3) times the shear stress).";
const char nw_note_gross[] =
    "The nominal stress is that of the gross section; with a net-section stress this factor would "
    "be wrong on the safe side.";
