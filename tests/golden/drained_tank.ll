define i64 @uq_start(ptr noalias %lanes, ptr noalias readonly %settings) #0 {
entry:
  ; what depends on the inputs alone, once per member
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 20
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  store <8 x double> %v2, ptr %v3, align 64
  %v4 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  store <8 x double> %v4, ptr %v5, align 64
  ; first rates and first step
  %v6 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v7 = load <8 x double>, ptr %v6, align 64
  %v8 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v9 = load <8 x double>, ptr %v8, align 64
  %v10 = getelementptr inbounds <8 x double>, ptr %lanes, i64 19
  %v11 = load <8 x double>, ptr %v10, align 64
  %v12 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v13 = load <8 x double>, ptr %v12, align 64
  %v14 = fsub <8 x double> %v7, %v13
  %v15 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v16 = load <8 x double>, ptr %v15, align 64
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v14, <8 x double> %v18)
  %v20 = fcmp ogt <8 x double> %v2, splat (double 0x0000000000000000)
  %v21 = select <8 x i1> %v20, <8 x double> %v2, <8 x double> splat (double 0x0000000000000000)
  %v22 = fcmp uno <8 x double> %v2, %v2
  %v23 = select <8 x i1> %v22, <8 x double> %v2, <8 x double> %v21
  %v24 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v23)
  %v25 = fneg <8 x double> %v11
  %v26 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v24, <8 x double> %v19)
  %v27 = fdiv <8 x double> %v26, %v9
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v27, ptr %v28, align 64
  %v29 = getelementptr inbounds <8 x double>, ptr %lanes, i64 2
  %v30 = load <8 x double>, ptr %v29, align 64
  %v31 = fsub <8 x double> %v30, %v7
  %v32 = getelementptr inbounds <8 x double>, ptr %settings, i64 0
  %v33 = load <8 x double>, ptr %v32, align 64
  %v34 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v35 = getelementptr inbounds <8 x double>, ptr %settings, i64 7
  %v36 = load <8 x double>, ptr %v35, align 64
  %v37 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v34, <8 x double> %v36)
  %v38 = fdiv <8 x double> %v2, %v37
  %v39 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v38, <8 x double> %v38, <8 x double> splat (double 0x0000000000000000))
  %v40 = fmul <8 x double> %v39, splat (double 0x3FF0000000000000)
  %v41 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v40)
  %v42 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v43 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v42, <8 x double> %v36)
  %v44 = fdiv <8 x double> %v27, %v43
  %v45 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v44, <8 x double> %v44, <8 x double> splat (double 0x0000000000000000))
  %v46 = fmul <8 x double> %v45, splat (double 0x3FF0000000000000)
  %v47 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v46)
  %v48 = fcmp olt <8 x double> %v41, splat (double 0x3EE4F8B588E368F1)
  %v49 = fcmp olt <8 x double> %v47, splat (double 0x3EE4F8B588E368F1)
  %v50 = or <8 x i1> %v48, %v49
  %v51 = fmul <8 x double> %v31, splat (double 0x3EB0C6F7A0B5ED8D)
  %v52 = fmul <8 x double> splat (double 0x3F847AE147AE147B), %v41
  %v53 = fdiv <8 x double> %v52, %v47
  %v54 = select <8 x i1> %v50, <8 x double> %v51, <8 x double> %v53
  %v55 = fcmp olt <8 x double> %v54, %v31
  %v56 = select <8 x i1> %v55, <8 x double> %v54, <8 x double> %v31
  %v57 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v56, <8 x double> %v27, <8 x double> %v2)
  %v58 = fadd <8 x double> %v7, %v56
  %v59 = fsub <8 x double> %v58, %v13
  %v60 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v59, <8 x double> %v18)
  %v61 = fcmp ogt <8 x double> %v57, splat (double 0x0000000000000000)
  %v62 = select <8 x i1> %v61, <8 x double> %v57, <8 x double> splat (double 0x0000000000000000)
  %v63 = fcmp uno <8 x double> %v57, %v57
  %v64 = select <8 x i1> %v63, <8 x double> %v57, <8 x double> %v62
  %v65 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v64)
  %v66 = fneg <8 x double> %v11
  %v67 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v66, <8 x double> %v65, <8 x double> %v60)
  %v68 = fdiv <8 x double> %v67, %v9
  %v69 = fsub <8 x double> %v68, %v27
  %v70 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v71 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v70, <8 x double> %v36)
  %v72 = fdiv <8 x double> %v69, %v71
  %v73 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v72, <8 x double> %v72, <8 x double> splat (double 0x0000000000000000))
  %v74 = fmul <8 x double> %v73, splat (double 0x3FF0000000000000)
  %v75 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v74)
  %v76 = fdiv <8 x double> %v75, %v56
  %v77 = fcmp ogt <8 x double> %v47, %v76
  %v78 = select <8 x i1> %v77, <8 x double> %v47, <8 x double> %v76
  %v79 = fcmp olt <8 x double> %v78, splat (double 0x73D658E3AB795204)
  %v80 = select <8 x i1> %v79, <8 x double> %v78, <8 x double> splat (double 0x73D658E3AB795204)
  %v81 = fcmp ogt <8 x double> %v80, splat (double 0x0C06E93F5DA2824C)
  %v82 = select <8 x i1> %v81, <8 x double> %v80, <8 x double> splat (double 0x0C06E93F5DA2824C)
  %v83 = bitcast <8 x double> %v82 to <8 x i64>
  %v84 = lshr <8 x i64> %v83, splat (i64 52)
  %v85 = or <8 x i64> %v84, splat (i64 4841369599423283200)
  %v86 = bitcast <8 x i64> %v85 to <8 x double>
  %v87 = fsub <8 x double> %v86, splat (double 0x43300000000003FF)
  %v88 = and <8 x i64> %v83, splat (i64 4503599627370495)
  %v89 = or <8 x i64> %v88, splat (i64 4607182418800017408)
  %v90 = bitcast <8 x i64> %v89 to <8 x double>
  %v91 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v90, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v92 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v91, <8 x double> %v90, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v93 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v92, <8 x double> %v90, <8 x double> splat (double 0xC00BEB4578B01506))
  %v94 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v93, <8 x double> %v90, <8 x double> splat (double 0x401431010187BF7D))
  %v95 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v94, <8 x double> %v90, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v96 = fadd <8 x double> %v87, %v95
  %v97 = fmul <8 x double> %v96, splat (double 0xBFC999999999999A)
  %v98 = fadd <8 x double> %v97, splat (double 0xBFF542A5A12E1C5A)
  %v99 = fadd <8 x double> %v98, splat (double 0x4338000000000000)
  %v100 = fsub <8 x double> %v99, splat (double 0x4338000000000000)
  %v101 = fsub <8 x double> %v98, %v100
  %v102 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v101, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v103 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v102, <8 x double> %v101, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v104 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v103, <8 x double> %v101, <8 x double> splat (double 0x3FE62E0C17657753))
  %v105 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v104, <8 x double> %v101, <8 x double> splat (double 0x3FF0000000000000))
  %v106 = bitcast <8 x double> %v99 to <8 x i64>
  %v107 = shl <8 x i64> %v106, splat (i64 52)
  %v108 = bitcast <8 x double> %v105 to <8 x i64>
  %v109 = add <8 x i64> %v108, %v107
  %v110 = bitcast <8 x i64> %v109 to <8 x double>
  %v111 = fmul <8 x double> %v31, splat (double 0x3EB0C6F7A0B5ED8D)
  %v112 = fmul <8 x double> %v56, splat (double 0x3F50624DD2F1A9FC)
  %v113 = fcmp ogt <8 x double> %v111, %v112
  %v114 = select <8 x i1> %v113, <8 x double> %v111, <8 x double> %v112
  %v115 = fcmp ole <8 x double> %v78, splat (double 0x3CD203AF9EE75616)
  %v116 = select <8 x i1> %v115, <8 x double> %v114, <8 x double> %v110
  %v117 = fmul <8 x double> splat (double 0x4059000000000000), %v56
  %v118 = fcmp olt <8 x double> %v117, %v116
  %v119 = select <8 x i1> %v118, <8 x double> %v117, <8 x double> %v116
  %v120 = fcmp olt <8 x double> %v119, %v31
  %v121 = select <8 x i1> %v120, <8 x double> %v119, <8 x double> %v31
  %v122 = fcmp ord <8 x double> %v76, %v76
  %v123 = select <8 x i1> %v122, <8 x double> %v121, <8 x double> %v56
  %v124 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v123, ptr %v124, align 64
  %v125 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> splat (double 0xC03A934F0979A371), ptr %v125, align 64
  %v126 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> splat (double 0x0000000000000000), ptr %v126, align 64
  %v127 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> splat (double 0x0000000000000000), ptr %v127, align 64
  %v128 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> splat (double 0x0000000000000000), ptr %v128, align 64
  %v129 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  store <8 x double> splat (double 0x0000000000000000), ptr %v129, align 64
  %v130 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> splat (double 0x0000000000000000), ptr %v130, align 64
  %v131 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v131, align 64
  %v132 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v7, ptr %v132, align 64
  %v133 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v133, align 64
  %v134 = getelementptr inbounds <8 x double>, ptr %settings, i64 8
  %v135 = load <8 x double>, ptr %v134, align 64
  %v136 = fcmp olt <8 x double> %v2, %v135
  %v137 = or <8 x i1> zeroinitializer, %v136
  %v138 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v139 = load <8 x double>, ptr %v138, align 64
  %v140 = fcmp ogt <8 x double> %v2, %v139
  %v141 = or <8 x i1> %v137, %v140
  %v142 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v2, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v143 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v27, <8 x double> splat (double 0x0000000000000000), <8 x double> %v142)
  %v144 = fcmp uno <8 x double> %v143, %v143
  %v145 = select <8 x i1> %v141, <8 x double> splat (double 0x4000000000000000), <8 x double> splat (double 0x0000000000000000)
  %v146 = select <8 x i1> %v144, <8 x double> splat (double 0x4008000000000000), <8 x double> %v145
  %v147 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v146, ptr %v147, align 64
  %v148 = or <8 x i1> %v141, %v144
  %v149 = bitcast <8 x i1> %v148 to i8
  %v150 = zext i8 %v149 to i64
  ret i64 %v150
}

define i64 @uq_rates(ptr noalias %lanes, ptr noalias readonly %settings) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 19
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v8 = load <8 x double>, ptr %v7, align 64
  %v9 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v10 = load <8 x double>, ptr %v9, align 64
  %v11 = fsub <8 x double> %v2, %v10
  %v12 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v13 = load <8 x double>, ptr %v12, align 64
  %v14 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v15 = load <8 x double>, ptr %v14, align 64
  %v16 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v13, <8 x double> %v11, <8 x double> %v15)
  %v17 = fcmp ogt <8 x double> %v8, splat (double 0x0000000000000000)
  %v18 = select <8 x i1> %v17, <8 x double> %v8, <8 x double> splat (double 0x0000000000000000)
  %v19 = fcmp uno <8 x double> %v8, %v8
  %v20 = select <8 x i1> %v19, <8 x double> %v8, <8 x double> %v18
  %v21 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v20)
  %v22 = fneg <8 x double> %v6
  %v23 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v22, <8 x double> %v21, <8 x double> %v16)
  %v24 = fdiv <8 x double> %v23, %v4
  %v25 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  %v26 = load <8 x double>, ptr %v25, align 64
  %v27 = fcmp ogt <8 x double> %v26, splat (double 0x0000000000000000)
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v29 = load <8 x double>, ptr %v28, align 64
  %v30 = select <8 x i1> %v27, <8 x double> %v24, <8 x double> %v29
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v30, ptr %v31, align 64
  %v32 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  store <8 x double> splat (double 0x0000000000000000), ptr %v32, align 64
  %v33 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v34 = fcmp uno <8 x double> %v33, %v33
  %v35 = and <8 x i1> %v27, %v34
  %v36 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  %v37 = load <8 x double>, ptr %v36, align 64
  %v38 = select <8 x i1> %v35, <8 x double> splat (double 0x4008000000000000), <8 x double> %v37
  %v39 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v38, ptr %v39, align 64
  %v40 = bitcast <8 x i1> %v35 to i8
  %v41 = zext i8 %v40 to i64
  ret i64 %v41
}

define i64 @uq_step(ptr noalias %lanes, ptr noalias readonly %settings) #0 {
entry:
  ; length of the attempt: proposed, stretched or halved towards the end of the segment
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 2
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = fsub <8 x double> %v6, %v2
  %v8 = fmul <8 x double> %v4, splat (double 0x3FF028F5C28F5C29)
  %v9 = fcmp oge <8 x double> %v8, %v7
  %v10 = fadd <8 x double> %v4, %v4
  %v11 = fcmp oge <8 x double> %v10, %v7
  %v12 = fmul <8 x double> %v7, splat (double 0x3FE0000000000000)
  %v13 = select <8 x i1> %v11, <8 x double> %v12, <8 x double> %v4
  %v14 = select <8 x i1> %v9, <8 x double> %v7, <8 x double> %v13
  %v15 = fadd <8 x double> %v2, %v14
  %v16 = select <8 x i1> %v9, <8 x double> %v6, <8 x double> %v15
  ; stages
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = fmul <8 x double> splat (double 0x3FC999999999999A), %v18
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v21 = load <8 x double>, ptr %v20, align 64
  %v22 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v19, <8 x double> %v21)
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = getelementptr inbounds <8 x double>, ptr %lanes, i64 19
  %v26 = load <8 x double>, ptr %v25, align 64
  %v27 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC999999999999A), <8 x double> %v14, <8 x double> %v2)
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v29 = load <8 x double>, ptr %v28, align 64
  %v30 = fsub <8 x double> %v27, %v29
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v32 = load <8 x double>, ptr %v31, align 64
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v34 = load <8 x double>, ptr %v33, align 64
  %v35 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v32, <8 x double> %v30, <8 x double> %v34)
  %v36 = fcmp ogt <8 x double> %v22, splat (double 0x0000000000000000)
  %v37 = select <8 x i1> %v36, <8 x double> %v22, <8 x double> splat (double 0x0000000000000000)
  %v38 = fcmp uno <8 x double> %v22, %v22
  %v39 = select <8 x i1> %v38, <8 x double> %v22, <8 x double> %v37
  %v40 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v39)
  %v41 = fneg <8 x double> %v26
  %v42 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v41, <8 x double> %v40, <8 x double> %v35)
  %v43 = fdiv <8 x double> %v42, %v24
  %v44 = fmul <8 x double> splat (double 0x3FB3333333333333), %v18
  %v45 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FCCCCCCCCCCCCCD), <8 x double> %v43, <8 x double> %v44)
  %v46 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v45, <8 x double> %v21)
  %v47 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD3333333333333), <8 x double> %v14, <8 x double> %v2)
  %v48 = fsub <8 x double> %v47, %v29
  %v49 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v32, <8 x double> %v48, <8 x double> %v34)
  %v50 = fcmp ogt <8 x double> %v46, splat (double 0x0000000000000000)
  %v51 = select <8 x i1> %v50, <8 x double> %v46, <8 x double> splat (double 0x0000000000000000)
  %v52 = fcmp uno <8 x double> %v46, %v46
  %v53 = select <8 x i1> %v52, <8 x double> %v46, <8 x double> %v51
  %v54 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v53)
  %v55 = fneg <8 x double> %v26
  %v56 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v55, <8 x double> %v54, <8 x double> %v49)
  %v57 = fdiv <8 x double> %v56, %v24
  %v58 = fmul <8 x double> splat (double 0x3FEF49F49F49F49F), %v18
  %v59 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00DDDDDDDDDDDDE), <8 x double> %v43, <8 x double> %v58)
  %v60 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C71C71C71C71C), <8 x double> %v57, <8 x double> %v59)
  %v61 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v60, <8 x double> %v21)
  %v62 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE999999999999A), <8 x double> %v14, <8 x double> %v2)
  %v63 = fsub <8 x double> %v62, %v29
  %v64 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v32, <8 x double> %v63, <8 x double> %v34)
  %v65 = fcmp ogt <8 x double> %v61, splat (double 0x0000000000000000)
  %v66 = select <8 x i1> %v65, <8 x double> %v61, <8 x double> splat (double 0x0000000000000000)
  %v67 = fcmp uno <8 x double> %v61, %v61
  %v68 = select <8 x i1> %v67, <8 x double> %v61, <8 x double> %v66
  %v69 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v68)
  %v70 = fneg <8 x double> %v26
  %v71 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v70, <8 x double> %v69, <8 x double> %v64)
  %v72 = fdiv <8 x double> %v71, %v24
  %v73 = fmul <8 x double> splat (double 0x40079EEC0FC37181), %v18
  %v74 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC027310BD29520E4), <8 x double> %v43, <8 x double> %v73)
  %v75 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4023A552363C5290), <8 x double> %v57, <8 x double> %v74)
  %v76 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD29C9EBA1E3345), <8 x double> %v72, <8 x double> %v75)
  %v77 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v76, <8 x double> %v21)
  %v78 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FEC71C71C71C71C), <8 x double> %v14, <8 x double> %v2)
  %v79 = fsub <8 x double> %v78, %v29
  %v80 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v32, <8 x double> %v79, <8 x double> %v34)
  %v81 = fcmp ogt <8 x double> %v77, splat (double 0x0000000000000000)
  %v82 = select <8 x i1> %v81, <8 x double> %v77, <8 x double> splat (double 0x0000000000000000)
  %v83 = fcmp uno <8 x double> %v77, %v77
  %v84 = select <8 x i1> %v83, <8 x double> %v77, <8 x double> %v82
  %v85 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v84)
  %v86 = fneg <8 x double> %v26
  %v87 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v86, <8 x double> %v85, <8 x double> %v80)
  %v88 = fdiv <8 x double> %v87, %v24
  %v89 = fmul <8 x double> splat (double 0x4006C52BF5A814B0), %v18
  %v90 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC02583E0F83E0F84), <8 x double> %v43, <8 x double> %v89)
  %v91 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4021D016A3721E8B), <8 x double> %v57, <8 x double> %v90)
  %v92 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD1D1745D1745D1), <8 x double> %v72, <8 x double> %v91)
  %v93 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD1818970D9CC2F), <8 x double> %v88, <8 x double> %v92)
  %v94 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v93, <8 x double> %v21)
  %v95 = fsub <8 x double> %v16, %v29
  %v96 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v32, <8 x double> %v95, <8 x double> %v34)
  %v97 = fcmp ogt <8 x double> %v94, splat (double 0x0000000000000000)
  %v98 = select <8 x i1> %v97, <8 x double> %v94, <8 x double> splat (double 0x0000000000000000)
  %v99 = fcmp uno <8 x double> %v94, %v94
  %v100 = select <8 x i1> %v99, <8 x double> %v94, <8 x double> %v98
  %v101 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v100)
  %v102 = fneg <8 x double> %v26
  %v103 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v102, <8 x double> %v101, <8 x double> %v96)
  %v104 = fdiv <8 x double> %v103, %v24
  %v105 = fmul <8 x double> splat (double 0x3FB7555555555555), %v18
  %v106 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDCC0499A5605FB), <8 x double> %v57, <8 x double> %v105)
  %v107 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE4D55555555555), <8 x double> %v72, <8 x double> %v106)
  %v108 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD4A1CFB2B78C13), <8 x double> %v88, <8 x double> %v107)
  %v109 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC0C30C30C30C31), <8 x double> %v104, <8 x double> %v108)
  %v110 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v109, <8 x double> %v21)
  %v111 = fsub <8 x double> %v16, %v29
  %v112 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v32, <8 x double> %v111, <8 x double> %v34)
  %v113 = fcmp ogt <8 x double> %v110, splat (double 0x0000000000000000)
  %v114 = select <8 x i1> %v113, <8 x double> %v110, <8 x double> splat (double 0x0000000000000000)
  %v115 = fcmp uno <8 x double> %v110, %v110
  %v116 = select <8 x i1> %v115, <8 x double> %v110, <8 x double> %v114
  %v117 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v116)
  %v118 = fneg <8 x double> %v26
  %v119 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v118, <8 x double> %v117, <8 x double> %v112)
  %v120 = fdiv <8 x double> %v119, %v24
  ; error in units of the tolerance, squared, averaged over the states
  %v121 = getelementptr inbounds <8 x double>, ptr %settings, i64 0
  %v122 = load <8 x double>, ptr %v121, align 64
  %v123 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v21)
  %v124 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v110)
  %v125 = fcmp ogt <8 x double> %v123, %v124
  %v126 = select <8 x i1> %v125, <8 x double> %v123, <8 x double> %v124
  %v127 = getelementptr inbounds <8 x double>, ptr %settings, i64 7
  %v128 = load <8 x double>, ptr %v127, align 64
  %v129 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v122, <8 x double> %v126, <8 x double> %v128)
  %v130 = fmul <8 x double> splat (double 0x3F54320FEDCBA987), %v18
  %v131 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF716B5A550ABFC4), <8 x double> %v57, <8 x double> %v130)
  %v132 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA2EEEEEEEEEEEF), <8 x double> %v72, <8 x double> %v131)
  %v133 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFAA0AD1D2CA1858), <8 x double> %v88, <8 x double> %v132)
  %v134 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA5748A7BDAF0E2), <8 x double> %v104, <8 x double> %v133)
  %v135 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF9999999999999A), <8 x double> %v120, <8 x double> %v134)
  %v136 = fmul <8 x double> %v14, %v135
  %v137 = fdiv <8 x double> %v136, %v129
  %v138 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v137, <8 x double> %v137, <8 x double> splat (double 0x0000000000000000))
  %v139 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v110, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v140 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v120, <8 x double> splat (double 0x0000000000000000), <8 x double> %v139)
  %v141 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v138, <8 x double> splat (double 0x3FF0000000000000), <8 x double> %v140)
  ; accepted or refused, and the next length
  %v142 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  %v143 = load <8 x double>, ptr %v142, align 64
  %v144 = fcmp ogt <8 x double> %v143, splat (double 0x0000000000000000)
  %v145 = fcmp ole <8 x double> %v141, splat (double 0x3FF0000000000000)
  %v146 = and <8 x i1> %v144, %v145
  %v147 = fcmp olt <8 x double> %v141, splat (double 0x46293E5939A08CEA)
  %v148 = select <8 x i1> %v147, <8 x double> %v141, <8 x double> splat (double 0x46293E5939A08CEA)
  %v149 = fcmp ogt <8 x double> %v148, splat (double 0x39B4484BFEEBC2A0)
  %v150 = select <8 x i1> %v149, <8 x double> %v148, <8 x double> splat (double 0x39B4484BFEEBC2A0)
  %v151 = bitcast <8 x double> %v150 to <8 x i64>
  %v152 = lshr <8 x i64> %v151, splat (i64 52)
  %v153 = or <8 x i64> %v152, splat (i64 4841369599423283200)
  %v154 = bitcast <8 x i64> %v153 to <8 x double>
  %v155 = fsub <8 x double> %v154, splat (double 0x43300000000003FF)
  %v156 = and <8 x i64> %v151, splat (i64 4503599627370495)
  %v157 = or <8 x i64> %v156, splat (i64 4607182418800017408)
  %v158 = bitcast <8 x i64> %v157 to <8 x double>
  %v159 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v158, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v160 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v159, <8 x double> %v158, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v161 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v160, <8 x double> %v158, <8 x double> splat (double 0xC00BEB4578B01506))
  %v162 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v161, <8 x double> %v158, <8 x double> splat (double 0x401431010187BF7D))
  %v163 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v162, <8 x double> %v158, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v164 = fadd <8 x double> %v155, %v163
  %v165 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  %v166 = load <8 x double>, ptr %v165, align 64
  %v167 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v166, <8 x double> splat (double 0x3F947AE147AE147B), <8 x double> splat (double 0xBFC374D65D9E608D))
  %v168 = select <8 x i1> %v146, <8 x double> %v167, <8 x double> splat (double 0xBFC374D65D9E608D)
  %v169 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v164, <8 x double> splat (double 0xBFB5C28F5C28F5C3), <8 x double> %v168)
  %v170 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  %v171 = load <8 x double>, ptr %v170, align 64
  %v172 = fcmp ogt <8 x double> %v171, splat (double 0x0000000000000000)
  %v173 = xor <8 x i1> %v146, splat (i1 true)
  %v174 = or <8 x i1> %v172, %v173
  %v175 = select <8 x i1> %v174, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x400A934F0979A371)
  %v176 = fcmp olt <8 x double> %v169, %v175
  %v177 = select <8 x i1> %v176, <8 x double> %v169, <8 x double> %v175
  %v178 = fcmp ogt <8 x double> %v177, splat (double 0xC002934F0979A371)
  %v179 = select <8 x i1> %v178, <8 x double> %v177, <8 x double> splat (double 0xC002934F0979A371)
  %v180 = fadd <8 x double> %v179, splat (double 0x4338000000000000)
  %v181 = fsub <8 x double> %v180, splat (double 0x4338000000000000)
  %v182 = fsub <8 x double> %v179, %v181
  %v183 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v182, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v184 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v183, <8 x double> %v182, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v185 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v184, <8 x double> %v182, <8 x double> splat (double 0x3FE62E0C17657753))
  %v186 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v185, <8 x double> %v182, <8 x double> splat (double 0x3FF0000000000000))
  %v187 = bitcast <8 x double> %v180 to <8 x i64>
  %v188 = shl <8 x i64> %v187, splat (i64 52)
  %v189 = bitcast <8 x double> %v186 to <8 x i64>
  %v190 = add <8 x i64> %v189, %v188
  %v191 = bitcast <8 x i64> %v190 to <8 x double>
  %v192 = fmul <8 x double> %v14, %v191
  %v193 = fcmp oge <8 x double> %v191, splat (double 0x3FF0000000000000)
  %v194 = fcmp ogt <8 x double> %v4, %v192
  %v195 = and <8 x i1> %v193, %v194
  %v196 = and <8 x i1> %v146, %v195
  %v197 = select <8 x i1> %v196, <8 x double> %v4, <8 x double> %v192
  %v198 = fcmp ogt <8 x double> %v164, splat (double 0xC03A934F0979A371)
  %v199 = select <8 x i1> %v198, <8 x double> %v164, <8 x double> splat (double 0xC03A934F0979A371)
  ; what the lane is now
  %v200 = fcmp ogt <8 x double> %v143, splat (double 0x0000000000000000)
  %v201 = xor <8 x i1> %v146, splat (i1 true)
  %v202 = and <8 x i1> %v200, %v201
  %v203 = select <8 x i1> %v146, <8 x double> %v16, <8 x double> %v2
  %v204 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v203, ptr %v204, align 64
  %v205 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v206 = load <8 x double>, ptr %v205, align 64
  %v207 = select <8 x i1> %v146, <8 x double> %v2, <8 x double> %v206
  %v208 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v207, ptr %v208, align 64
  %v209 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v210 = load <8 x double>, ptr %v209, align 64
  %v211 = select <8 x i1> %v146, <8 x double> %v14, <8 x double> %v210
  %v212 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> %v211, ptr %v212, align 64
  %v213 = select <8 x i1> %v146, <8 x double> %v199, <8 x double> %v166
  %v214 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> %v213, ptr %v214, align 64
  %v215 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v197, ptr %v215, align 64
  %v216 = select <8 x i1> %v202, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v217 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> %v216, ptr %v217, align 64
  %v218 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  %v219 = load <8 x double>, ptr %v218, align 64
  %v220 = fmul <8 x double> %v219, splat (double 0x3FE0000000000000)
  %v221 = select <8 x i1> %v146, <8 x double> %v220, <8 x double> %v219
  %v222 = fcmp olt <8 x double> %v141, splat (double 0x7FF0000000000000)
  %v223 = select <8 x i1> %v222, <8 x double> %v221, <8 x double> splat (double 0x3FF0000000000000)
  %v224 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> %v223, ptr %v224, align 64
  %v225 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  %v226 = load <8 x double>, ptr %v225, align 64
  %v227 = select <8 x i1> %v146, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v228 = fadd <8 x double> %v226, %v227
  %v229 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  %v230 = load <8 x double>, ptr %v229, align 64
  %v231 = select <8 x i1> %v202, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v232 = fadd <8 x double> %v230, %v231
  %v233 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> %v228, ptr %v233, align 64
  %v234 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> %v232, ptr %v234, align 64
  ; who needs attention
  %v235 = and <8 x i1> %v146, %v9
  %v236 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v237 = getelementptr inbounds <8 x double>, ptr %settings, i64 2
  %v238 = load <8 x double>, ptr %v237, align 64
  %v239 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v236, <8 x double> %v238)
  %v240 = fcmp olt <8 x double> %v197, %v239
  %v241 = fadd <8 x double> %v228, %v232
  %v242 = getelementptr inbounds <8 x double>, ptr %settings, i64 1
  %v243 = load <8 x double>, ptr %v242, align 64
  %v244 = fcmp oge <8 x double> %v241, %v243
  %v245 = fcmp ogt <8 x double> %v143, splat (double 0x0000000000000000)
  %v246 = xor <8 x i1> %v235, splat (i1 true)
  %v247 = and <8 x i1> %v245, %v246
  %v248 = or <8 x i1> %v240, %v244
  %v249 = and <8 x i1> %v247, %v248
  %v250 = getelementptr inbounds <8 x double>, ptr %settings, i64 8
  %v251 = load <8 x double>, ptr %v250, align 64
  %v252 = fcmp olt <8 x double> %v110, %v251
  %v253 = or <8 x i1> zeroinitializer, %v252
  %v254 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v255 = load <8 x double>, ptr %v254, align 64
  %v256 = fcmp ogt <8 x double> %v110, %v255
  %v257 = or <8 x i1> %v253, %v256
  %v258 = and <8 x i1> %v146, %v257
  %v259 = or <8 x i1> %v249, %v258
  %v260 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v261 = load <8 x double>, ptr %v260, align 64
  %v262 = fcmp olt <8 x double> %v261, %v16
  %v263 = fcmp ole <8 x double> %v261, %v16
  %v264 = or <8 x i1> %v235, %v259
  %v265 = select <8 x i1> %v264, <8 x i1> %v262, <8 x i1> %v263
  %v266 = and <8 x i1> %v146, %v265
  %v267 = bitcast <8 x i1> %v235 to i8
  %v268 = zext i8 %v267 to i64
  %v269 = bitcast <8 x i1> %v259 to i8
  %v270 = zext i8 %v269 to i64
  %v271 = bitcast <8 x i1> %v266 to i8
  %v272 = icmp ne i8 %v271, 0
  br i1 %v272, label %curve, label %move
curve:
  %v273 = fsub <8 x double> %v110, %v21
  %v274 = fneg <8 x double> %v273
  %v275 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v18, <8 x double> %v274)
  %v276 = fneg <8 x double> %v14
  %v277 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v276, <8 x double> %v120, <8 x double> %v273)
  %v278 = fsub <8 x double> %v277, %v275
  %v279 = fmul <8 x double> splat (double 0xBFF208439215A046), %v18
  %v280 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40056744F3B9A987), <8 x double> %v57, <8 x double> %v279)
  %v281 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC016BDFAC7A2320C), <8 x double> %v72, <8 x double> %v280)
  %v282 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C2CEAE0978C92), <8 x double> %v88, <8 x double> %v281)
  %v283 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFFC46C8B61F95E5), <8 x double> %v104, <8 x double> %v282)
  %v284 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40030F4BDF0DC914), <8 x double> %v120, <8 x double> %v283)
  %v285 = fmul <8 x double> %v14, %v284
  %v286 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  store <8 x double> %v21, ptr %v286, align 64
  %v287 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  store <8 x double> %v273, ptr %v287, align 64
  %v288 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  store <8 x double> %v275, ptr %v288, align 64
  %v289 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  store <8 x double> %v278, ptr %v289, align 64
  %v290 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  store <8 x double> %v285, ptr %v290, align 64
  br label %move
move:
  %v291 = select <8 x i1> %v146, <8 x double> %v110, <8 x double> %v21
  %v292 = select <8 x i1> %v146, <8 x double> %v120, <8 x double> %v18
  %v293 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  store <8 x double> %v291, ptr %v293, align 64
  %v294 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v292, ptr %v294, align 64
  %v295 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  %v296 = load <8 x double>, ptr %v295, align 64
  %v297 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v291)
  %v298 = fcmp ogt <8 x double> %v296, %v297
  %v299 = select <8 x i1> %v298, <8 x double> %v296, <8 x double> %v297
  %v300 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  store <8 x double> %v299, ptr %v300, align 64
  br i1 %v272, label %observe, label %judge
observe:
  %v301 = or i64 %v268, %v270
  %v302 = bitcast <8 x i1> %v266 to i8
  %v303 = zext i8 %v302 to i64
  call void @uq_observe(ptr %lanes, ptr %settings, i64 %v303, i64 %v301)
  br label %judge
judge:
  %v304 = bitcast <8 x i1> %v259 to i8
  %v305 = icmp ne i8 %v304, 0
  br i1 %v305, label %failure, label %done
failure:
  %v306 = fcmp ogt <8 x double> %v223, splat (double 0x3F50000000000000)
  %v307 = select <8 x i1> %v306, <8 x double> splat (double 0x4008000000000000), <8 x double> splat (double 0x401C000000000000)
  %v308 = fmul <8 x double> %v239, splat (double 0x40C3880000000000)
  %v309 = getelementptr inbounds <8 x double>, ptr %settings, i64 3
  %v310 = load <8 x double>, ptr %v309, align 64
  %v311 = fmul <8 x double> %v291, %v292
  %v312 = fcmp ogt <8 x double> %v311, splat (double 0x0000000000000000)
  %v313 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v291)
  %v314 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v292)
  %v315 = fmul <8 x double> %v308, %v314
  %v316 = fcmp ole <8 x double> %v313, %v315
  %v317 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v291)
  %v318 = fcmp ogt <8 x double> %v317, splat (double 0x5F138D352E5096AF)
  %v319 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v291)
  %v320 = fmul <8 x double> %v122, %v319
  %v321 = fmul <8 x double> %v128, splat (double 0x412E848000000000)
  %v322 = fcmp ogt <8 x double> %v320, %v321
  %v323 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v291)
  %v324 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v292)
  %v325 = fmul <8 x double> %v310, %v324
  %v326 = fcmp ole <8 x double> %v323, %v325
  %v327 = and <8 x i1> %v322, %v326
  %v328 = or <8 x i1> %v316, %v318
  %v329 = or <8 x i1> %v328, %v327
  %v330 = and <8 x i1> %v312, %v329
  %v331 = or <8 x i1> zeroinitializer, %v330
  %v332 = select <8 x i1> %v331, <8 x double> splat (double 0x4010000000000000), <8 x double> %v307
  %v333 = select <8 x i1> %v240, <8 x double> %v332, <8 x double> splat (double 0x4014000000000000)
  %v334 = select <8 x i1> %v258, <8 x double> splat (double 0x4000000000000000), <8 x double> %v333
  %v335 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v334, ptr %v335, align 64
  br label %done
done:
  %v336 = shl i64 %v270, 8
  %v337 = or i64 %v268, %v336
  ret i64 %v337
}

define void @uq_observe(ptr noalias %lanes, ptr noalias readonly %settings, i64 %due, i64 %strict) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = trunc i64 %due to i8
  %v4 = bitcast i8 %v3 to <8 x i1>
  %v5 = trunc i64 %strict to i8
  %v6 = bitcast i8 %v5 to <8 x i1>
  %v7 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v8 = load <8 x double>, ptr %v7, align 64
  %v9 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 15
  %v10 = load <8 x i64>, ptr %v9, align 64
  %v11 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 16
  %v12 = load <8 x i64>, ptr %v11, align 64
  %v13 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 17
  %v14 = load <8 x i64>, ptr %v13, align 64
  br label %next
next:
  %due.now = phi <8 x i1> [ %v4, %entry ], [ %due.then, %next ]
  %at.now = phi <8 x double> [ %v8, %entry ], [ %at.then, %next ]
  %clock.now = phi <8 x i64> [ %v10, %entry ], [ %clock.then, %next ]
  %place.now = phi <8 x i64> [ %v12, %entry ], [ %place.then, %next ]
  %truth_place.now = phi <8 x i64> [ %v14, %entry ], [ %truth_place.then, %next ]
  %v15 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v16 = load <8 x double>, ptr %v15, align 64
  %v17 = fsub <8 x double> %at.now, %v16
  %v18 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v19 = load <8 x double>, ptr %v18, align 64
  %v20 = fdiv <8 x double> %v17, %v19
  %v21 = fsub <8 x double> splat (double 0x3FF0000000000000), %v20
  %v22 = fcmp oge <8 x double> %at.now, %v2
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  %v26 = load <8 x double>, ptr %v25, align 64
  %v27 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  %v28 = load <8 x double>, ptr %v27, align 64
  %v29 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  %v30 = load <8 x double>, ptr %v29, align 64
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  %v32 = load <8 x double>, ptr %v31, align 64
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  %v34 = load <8 x double>, ptr %v33, align 64
  %v35 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v21, <8 x double> %v34, <8 x double> %v32)
  %v36 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v20, <8 x double> %v35, <8 x double> %v30)
  %v37 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v38 = load <8 x double>, ptr %v37, align 64
  %v39 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v21, <8 x double> %v36, <8 x double> %v28)
  %v40 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v20, <8 x double> %v39, <8 x double> %v26)
  %v41 = select <8 x i1> %v22, <8 x double> %v38, <8 x double> %v40
  %v42 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v43 = load <8 x double>, ptr %v42, align 64
  %v44 = fsub <8 x double> %at.now, %v43
  %v45 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v46 = load <8 x double>, ptr %v45, align 64
  %v47 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v48 = load <8 x double>, ptr %v47, align 64
  %v49 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v46, <8 x double> %v44, <8 x double> %v48)
  %v50 = fcmp ogt <8 x double> %v41, %v24
  %v51 = getelementptr inbounds <8 x i64>, ptr %settings, i64 6
  %v52 = load <8 x i64>, ptr %v51, align 64
  %v53 = getelementptr inbounds <8 x i64>, ptr %settings, i64 5
  %v54 = load <8 x i64>, ptr %v53, align 64
  %v55 = select <8 x i1> %due.now, <8 x i64> %truth_place.now, <8 x i64> %v52
  %v56 = zext <8 x i1> %v50 to <8 x i8>
  %v57 = extractelement <8 x i64> %v55, i64 0
  %v58 = extractelement <8 x i64> %v55, i64 1
  %v59 = extractelement <8 x i64> %v55, i64 2
  %v60 = extractelement <8 x i64> %v55, i64 3
  %v61 = extractelement <8 x i64> %v55, i64 4
  %v62 = extractelement <8 x i64> %v55, i64 5
  %v63 = extractelement <8 x i64> %v55, i64 6
  %v64 = extractelement <8 x i64> %v55, i64 7
  %v65 = inttoptr i64 %v57 to ptr
  %v66 = inttoptr i64 %v58 to ptr
  %v67 = inttoptr i64 %v59 to ptr
  %v68 = inttoptr i64 %v60 to ptr
  %v69 = inttoptr i64 %v61 to ptr
  %v70 = inttoptr i64 %v62 to ptr
  %v71 = inttoptr i64 %v63 to ptr
  %v72 = inttoptr i64 %v64 to ptr
  %v73 = extractelement <8 x i8> %v56, i64 0
  store i8 %v73, ptr %v65, align 1
  %v74 = extractelement <8 x i8> %v56, i64 1
  store i8 %v74, ptr %v66, align 1
  %v75 = extractelement <8 x i8> %v56, i64 2
  store i8 %v75, ptr %v67, align 1
  %v76 = extractelement <8 x i8> %v56, i64 3
  store i8 %v76, ptr %v68, align 1
  %v77 = extractelement <8 x i8> %v56, i64 4
  store i8 %v77, ptr %v69, align 1
  %v78 = extractelement <8 x i8> %v56, i64 5
  store i8 %v78, ptr %v70, align 1
  %v79 = extractelement <8 x i8> %v56, i64 6
  store i8 %v79, ptr %v71, align 1
  %v80 = extractelement <8 x i8> %v56, i64 7
  store i8 %v80, ptr %v72, align 1
  %v81 = add <8 x i64> %truth_place.now, %v54
  %v82 = getelementptr inbounds <8 x i64>, ptr %settings, i64 4
  %v83 = load <8 x i64>, ptr %v82, align 64
  %v84 = select <8 x i1> %due.now, <8 x i64> %place.now, <8 x i64> %v52
  %v85 = extractelement <8 x i64> %v84, i64 0
  %v86 = extractelement <8 x i64> %v84, i64 1
  %v87 = extractelement <8 x i64> %v84, i64 2
  %v88 = extractelement <8 x i64> %v84, i64 3
  %v89 = extractelement <8 x i64> %v84, i64 4
  %v90 = extractelement <8 x i64> %v84, i64 5
  %v91 = extractelement <8 x i64> %v84, i64 6
  %v92 = extractelement <8 x i64> %v84, i64 7
  %v93 = inttoptr i64 %v85 to ptr
  %v94 = inttoptr i64 %v86 to ptr
  %v95 = inttoptr i64 %v87 to ptr
  %v96 = inttoptr i64 %v88 to ptr
  %v97 = inttoptr i64 %v89 to ptr
  %v98 = inttoptr i64 %v90 to ptr
  %v99 = inttoptr i64 %v91 to ptr
  %v100 = inttoptr i64 %v92 to ptr
  %v101 = extractelement <8 x double> %v41, i64 0
  store double %v101, ptr %v93, align 8
  %v102 = extractelement <8 x double> %v41, i64 1
  store double %v102, ptr %v94, align 8
  %v103 = extractelement <8 x double> %v41, i64 2
  store double %v103, ptr %v95, align 8
  %v104 = extractelement <8 x double> %v41, i64 3
  store double %v104, ptr %v96, align 8
  %v105 = extractelement <8 x double> %v41, i64 4
  store double %v105, ptr %v97, align 8
  %v106 = extractelement <8 x double> %v41, i64 5
  store double %v106, ptr %v98, align 8
  %v107 = extractelement <8 x double> %v41, i64 6
  store double %v107, ptr %v99, align 8
  %v108 = extractelement <8 x double> %v41, i64 7
  store double %v108, ptr %v100, align 8
  %v109 = add <8 x i64> %place.now, %v83
  %v110 = select <8 x i1> %due.now, <8 x i64> %v109, <8 x i64> %v52
  %v111 = extractelement <8 x i64> %v110, i64 0
  %v112 = extractelement <8 x i64> %v110, i64 1
  %v113 = extractelement <8 x i64> %v110, i64 2
  %v114 = extractelement <8 x i64> %v110, i64 3
  %v115 = extractelement <8 x i64> %v110, i64 4
  %v116 = extractelement <8 x i64> %v110, i64 5
  %v117 = extractelement <8 x i64> %v110, i64 6
  %v118 = extractelement <8 x i64> %v110, i64 7
  %v119 = inttoptr i64 %v111 to ptr
  %v120 = inttoptr i64 %v112 to ptr
  %v121 = inttoptr i64 %v113 to ptr
  %v122 = inttoptr i64 %v114 to ptr
  %v123 = inttoptr i64 %v115 to ptr
  %v124 = inttoptr i64 %v116 to ptr
  %v125 = inttoptr i64 %v117 to ptr
  %v126 = inttoptr i64 %v118 to ptr
  %v127 = extractelement <8 x double> %v49, i64 0
  store double %v127, ptr %v119, align 8
  %v128 = extractelement <8 x double> %v49, i64 1
  store double %v128, ptr %v120, align 8
  %v129 = extractelement <8 x double> %v49, i64 2
  store double %v129, ptr %v121, align 8
  %v130 = extractelement <8 x double> %v49, i64 3
  store double %v130, ptr %v122, align 8
  %v131 = extractelement <8 x double> %v49, i64 4
  store double %v131, ptr %v123, align 8
  %v132 = extractelement <8 x double> %v49, i64 5
  store double %v132, ptr %v124, align 8
  %v133 = extractelement <8 x double> %v49, i64 6
  store double %v133, ptr %v125, align 8
  %v134 = extractelement <8 x double> %v49, i64 7
  store double %v134, ptr %v126, align 8
  %v135 = add <8 x i64> %v109, %v83
  %v136 = select <8 x i1> %due.now, <8 x i64> splat (i64 8), <8 x i64> zeroinitializer
  %clock.then = add <8 x i64> %clock.now, %v136
  %place.then = add <8 x i64> %place.now, %v136
  %v137 = select <8 x i1> %due.now, <8 x i64> splat (i64 1), <8 x i64> zeroinitializer
  %truth_place.then = add <8 x i64> %truth_place.now, %v137
  %v138 = extractelement <8 x i64> %clock.then, i64 0
  %v139 = extractelement <8 x i64> %clock.then, i64 1
  %v140 = extractelement <8 x i64> %clock.then, i64 2
  %v141 = extractelement <8 x i64> %clock.then, i64 3
  %v142 = extractelement <8 x i64> %clock.then, i64 4
  %v143 = extractelement <8 x i64> %clock.then, i64 5
  %v144 = extractelement <8 x i64> %clock.then, i64 6
  %v145 = extractelement <8 x i64> %clock.then, i64 7
  %v146 = inttoptr i64 %v138 to ptr
  %v147 = inttoptr i64 %v139 to ptr
  %v148 = inttoptr i64 %v140 to ptr
  %v149 = inttoptr i64 %v141 to ptr
  %v150 = inttoptr i64 %v142 to ptr
  %v151 = inttoptr i64 %v143 to ptr
  %v152 = inttoptr i64 %v144 to ptr
  %v153 = inttoptr i64 %v145 to ptr
  %v154 = load double, ptr %v146, align 8
  %v155 = insertelement <8 x double> poison, double %v154, i64 0
  %v156 = load double, ptr %v147, align 8
  %v157 = insertelement <8 x double> %v155, double %v156, i64 1
  %v158 = load double, ptr %v148, align 8
  %v159 = insertelement <8 x double> %v157, double %v158, i64 2
  %v160 = load double, ptr %v149, align 8
  %v161 = insertelement <8 x double> %v159, double %v160, i64 3
  %v162 = load double, ptr %v150, align 8
  %v163 = insertelement <8 x double> %v161, double %v162, i64 4
  %v164 = load double, ptr %v151, align 8
  %v165 = insertelement <8 x double> %v163, double %v164, i64 5
  %v166 = load double, ptr %v152, align 8
  %v167 = insertelement <8 x double> %v165, double %v166, i64 6
  %v168 = load double, ptr %v153, align 8
  %v169 = insertelement <8 x double> %v167, double %v168, i64 7
  %at.then = select <8 x i1> %due.now, <8 x double> %v169, <8 x double> %at.now
  %v170 = fcmp olt <8 x double> %at.then, %v2
  %v171 = fcmp ole <8 x double> %at.then, %v2
  %v172 = select <8 x i1> %v6, <8 x i1> %v170, <8 x i1> %v171
  %due.then = and <8 x i1> %due.now, %v172
  %v173 = bitcast <8 x i1> %due.then to i8
  %v174 = icmp ne i8 %v173, 0
  br i1 %v174, label %next, label %done
done:
  %v175 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  store <8 x double> %at.then, ptr %v175, align 64
  %v176 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 15
  store <8 x i64> %clock.then, ptr %v176, align 64
  %v177 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 16
  store <8 x i64> %place.then, ptr %v177, align 64
  %v178 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 17
  store <8 x i64> %truth_place.then, ptr %v178, align 64
  ret void
}

define void @uq_outcomes(ptr noalias readonly %given, ptr noalias %taken, i64 %groups) #0 {
entry:
  %some = icmp sgt i64 %groups, 0
  br i1 %some, label %group, label %done
group:
  %g = phi i64 [ 0, %entry ], [ %next, %group ]
  %in = mul i64 %g, 5
  %out = mul i64 %g, 1
  %from = getelementptr inbounds <8 x double>, ptr %given, i64 %in
  %to = getelementptr inbounds <8 x double>, ptr %taken, i64 %out
  %v1 = getelementptr inbounds <8 x double>, ptr %from, i64 3
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %from, i64 4
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = fdiv <8 x double> %v4, %v2
  %v6 = getelementptr inbounds <8 x double>, ptr %to, i64 0
  store <8 x double> %v5, ptr %v6, align 64
  %next = add i64 %g, 1
  %more = icmp slt i64 %next, %groups
  br i1 %more, label %group, label %done
done:
  ret void
}

define void @uq_starts(ptr noalias readonly %given, ptr noalias %taken, i64 %groups) #0 {
entry:
  %some = icmp sgt i64 %groups, 0
  br i1 %some, label %group, label %done
group:
  %g = phi i64 [ 0, %entry ], [ %next, %group ]
  %in = mul i64 %g, 4
  %out = mul i64 %g, 1
  %from = getelementptr inbounds <8 x double>, ptr %given, i64 %in
  %to = getelementptr inbounds <8 x double>, ptr %taken, i64 %out
  %v1 = getelementptr inbounds <8 x double>, ptr %from, i64 2
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %to, i64 0
  store <8 x double> %v2, ptr %v3, align 64
  %next = add i64 %g, 1
  %more = icmp slt i64 %next, %groups
  br i1 %more, label %group, label %done
done:
  ret void
}

declare <8 x double> @llvm.fabs.v8f64(<8 x double>)
declare <8 x double> @llvm.fma.v8f64(<8 x double>, <8 x double>, <8 x double>)
declare <8 x double> @llvm.sqrt.v8f64(<8 x double>)

attributes #0 = { nounwind }
