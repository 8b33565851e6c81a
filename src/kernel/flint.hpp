#pragma once
#include "kernel/ieee754.hpp"

// The one place that knows both layouts of the ball-arithmetic library: separate (Arb 2) or inside FLINT 3.

#if __has_include(<flint/arb.h>)
#include <flint/acb.h>
#include <flint/acb_poly.h>
#include <flint/arb.h>
#include <flint/arf.h>
#include <flint/fmpq.h>
#include <flint/fmpz.h>
#include <flint/mag.h>
#else
#include <acb.h>
#include <acb_poly.h>
#include <arb.h>
#include <arf.h>
#include <flint/fmpq.h>
#include <flint/fmpz.h>
#include <mag.h>
#endif
