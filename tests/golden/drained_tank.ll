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
  %v35 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
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
  %v49 = fmul <8 x double> %v47, %v31
  %v50 = fcmp olt <8 x double> %v49, splat (double 0x3EE4F8B588E368F1)
  %v51 = or <8 x i1> %v48, %v50
  %v52 = fmul <8 x double> %v31, splat (double 0x3EB0C6F7A0B5ED8D)
  %v53 = fmul <8 x double> splat (double 0x3F847AE147AE147B), %v41
  %v54 = fdiv <8 x double> %v53, %v47
  %v55 = select <8 x i1> %v51, <8 x double> %v52, <8 x double> %v54
  %v56 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v7)
  %v57 = getelementptr inbounds <8 x double>, ptr %settings, i64 2
  %v58 = load <8 x double>, ptr %v57, align 64
  %v59 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v56, <8 x double> %v58)
  %v60 = fcmp ogt <8 x double> %v55, %v59
  %v61 = select <8 x i1> %v60, <8 x double> %v55, <8 x double> %v59
  %v62 = fcmp olt <8 x double> %v61, %v31
  %v63 = select <8 x i1> %v62, <8 x double> %v61, <8 x double> %v31
  %v64 = fdiv <8 x double> %v41, %v47
  %v65 = fcmp olt <8 x double> %v64, %v31
  %v66 = select <8 x i1> %v65, <8 x double> %v64, <8 x double> %v31
  %v67 = select <8 x i1> %v51, <8 x double> %v31, <8 x double> %v66
  %v68 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v63, <8 x double> %v27, <8 x double> %v2)
  %v69 = fadd <8 x double> %v7, %v63
  %v70 = fsub <8 x double> %v69, %v13
  %v71 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v70, <8 x double> %v18)
  %v72 = fcmp ogt <8 x double> %v68, splat (double 0x0000000000000000)
  %v73 = select <8 x i1> %v72, <8 x double> %v68, <8 x double> splat (double 0x0000000000000000)
  %v74 = fcmp uno <8 x double> %v68, %v68
  %v75 = select <8 x i1> %v74, <8 x double> %v68, <8 x double> %v73
  %v76 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v75)
  %v77 = fneg <8 x double> %v11
  %v78 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v77, <8 x double> %v76, <8 x double> %v71)
  %v79 = fdiv <8 x double> %v78, %v9
  %v80 = fsub <8 x double> %v79, %v27
  %v81 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v82 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v81, <8 x double> %v36)
  %v83 = fdiv <8 x double> %v80, %v82
  %v84 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v83, <8 x double> %v83, <8 x double> splat (double 0x0000000000000000))
  %v85 = fmul <8 x double> %v84, splat (double 0x3FF0000000000000)
  %v86 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v85)
  %v87 = fdiv <8 x double> %v86, %v63
  %v88 = fmul <8 x double> %v47, %v67
  %v89 = fmul <8 x double> %v87, %v67
  %v90 = fmul <8 x double> %v89, %v67
  %v91 = fcmp ogt <8 x double> %v88, %v90
  %v92 = select <8 x i1> %v91, <8 x double> %v88, <8 x double> %v90
  %v93 = fcmp olt <8 x double> %v92, splat (double 0x73D658E3AB795204)
  %v94 = select <8 x i1> %v93, <8 x double> %v92, <8 x double> splat (double 0x73D658E3AB795204)
  %v95 = fcmp ogt <8 x double> %v94, splat (double 0x0C06E93F5DA2824C)
  %v96 = select <8 x i1> %v95, <8 x double> %v94, <8 x double> splat (double 0x0C06E93F5DA2824C)
  %v97 = bitcast <8 x double> %v96 to <8 x i64>
  %v98 = lshr <8 x i64> %v97, splat (i64 52)
  %v99 = or <8 x i64> %v98, splat (i64 4841369599423283200)
  %v100 = bitcast <8 x i64> %v99 to <8 x double>
  %v101 = fsub <8 x double> %v100, splat (double 0x43300000000003FF)
  %v102 = and <8 x i64> %v97, splat (i64 4503599627370495)
  %v103 = or <8 x i64> %v102, splat (i64 4607182418800017408)
  %v104 = bitcast <8 x i64> %v103 to <8 x double>
  %v105 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v104, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v106 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v105, <8 x double> %v104, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v107 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v106, <8 x double> %v104, <8 x double> splat (double 0xC00BEB4578B01506))
  %v108 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v107, <8 x double> %v104, <8 x double> splat (double 0x401431010187BF7D))
  %v109 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v108, <8 x double> %v104, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v110 = fadd <8 x double> %v101, %v109
  %v111 = fmul <8 x double> %v110, splat (double 0xBFC999999999999A)
  %v112 = fadd <8 x double> %v111, splat (double 0xBFF542A5A12E1C5A)
  %v113 = fadd <8 x double> %v112, splat (double 0x4338000000000000)
  %v114 = fsub <8 x double> %v113, splat (double 0x4338000000000000)
  %v115 = fsub <8 x double> %v112, %v114
  %v116 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v115, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v117 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v116, <8 x double> %v115, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v118 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v117, <8 x double> %v115, <8 x double> splat (double 0x3FE62E0C17657753))
  %v119 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v118, <8 x double> %v115, <8 x double> splat (double 0x3FF0000000000000))
  %v120 = bitcast <8 x double> %v113 to <8 x i64>
  %v121 = shl <8 x i64> %v120, splat (i64 52)
  %v122 = bitcast <8 x double> %v119 to <8 x i64>
  %v123 = add <8 x i64> %v122, %v121
  %v124 = bitcast <8 x i64> %v123 to <8 x double>
  %v125 = fmul <8 x double> %v67, %v124
  %v126 = fmul <8 x double> %v31, splat (double 0x3EB0C6F7A0B5ED8D)
  %v127 = fmul <8 x double> %v63, splat (double 0x3F50624DD2F1A9FC)
  %v128 = fcmp ogt <8 x double> %v126, %v127
  %v129 = select <8 x i1> %v128, <8 x double> %v126, <8 x double> %v127
  %v130 = fcmp ole <8 x double> %v92, splat (double 0x3CD203AF9EE75616)
  %v131 = select <8 x i1> %v130, <8 x double> %v129, <8 x double> %v125
  %v132 = fmul <8 x double> splat (double 0x4059000000000000), %v63
  %v133 = fcmp olt <8 x double> %v132, %v131
  %v134 = select <8 x i1> %v133, <8 x double> %v132, <8 x double> %v131
  %v135 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v7)
  %v136 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v135, <8 x double> %v58)
  %v137 = fcmp ogt <8 x double> %v134, %v136
  %v138 = select <8 x i1> %v137, <8 x double> %v134, <8 x double> %v136
  %v139 = fcmp olt <8 x double> %v138, %v31
  %v140 = select <8 x i1> %v139, <8 x double> %v138, <8 x double> %v31
  %v141 = fcmp ord <8 x double> %v87, %v87
  %v142 = select <8 x i1> %v141, <8 x double> %v140, <8 x double> %v63
  %v143 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v142, ptr %v143, align 64
  %v144 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> splat (double 0xC03A934F0979A371), ptr %v144, align 64
  %v145 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> splat (double 0x0000000000000000), ptr %v145, align 64
  %v146 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> splat (double 0x0000000000000000), ptr %v146, align 64
  %v147 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> splat (double 0x0000000000000000), ptr %v147, align 64
  %v148 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  store <8 x double> splat (double 0x0000000000000000), ptr %v148, align 64
  %v149 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> splat (double 0x0000000000000000), ptr %v149, align 64
  %v150 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v150, align 64
  %v151 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v7, ptr %v151, align 64
  %v152 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v152, align 64
  %v153 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v154 = load <8 x double>, ptr %v153, align 64
  %v155 = fcmp olt <8 x double> %v2, %v154
  %v156 = or <8 x i1> zeroinitializer, %v155
  %v157 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v158 = load <8 x double>, ptr %v157, align 64
  %v159 = fcmp ogt <8 x double> %v2, %v158
  %v160 = or <8 x i1> %v156, %v159
  %v161 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v2, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v162 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v27, <8 x double> splat (double 0x0000000000000000), <8 x double> %v161)
  %v163 = fcmp uno <8 x double> %v162, %v162
  %v164 = select <8 x i1> %v160, <8 x double> splat (double 0x4000000000000000), <8 x double> splat (double 0x0000000000000000)
  %v165 = select <8 x i1> %v163, <8 x double> splat (double 0x4008000000000000), <8 x double> %v164
  %v166 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v165, ptr %v166, align 64
  %v167 = or <8 x i1> %v160, %v163
  %v168 = bitcast <8 x i1> %v167 to i8
  %v169 = zext i8 %v168 to i64
  ret i64 %v169
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

define i64 @uq_step(ptr noalias %lanes, ptr noalias readonly %settings) #1 {
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
  %v14 = fadd <8 x double> %v2, %v13
  %v15 = select <8 x i1> %v9, <8 x double> %v6, <8 x double> %v14
  %v16 = fsub <8 x double> %v15, %v2
  ; stages
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = fmul <8 x double> splat (double 0x3FC999999999999A), %v18
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v21 = load <8 x double>, ptr %v20, align 64
  %v22 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v19, <8 x double> %v21)
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = getelementptr inbounds <8 x double>, ptr %lanes, i64 19
  %v26 = load <8 x double>, ptr %v25, align 64
  %v27 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC999999999999A), <8 x double> %v16, <8 x double> %v2)
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
  %v46 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v45, <8 x double> %v21)
  %v47 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD3333333333333), <8 x double> %v16, <8 x double> %v2)
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
  %v61 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v60, <8 x double> %v21)
  %v62 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE999999999999A), <8 x double> %v16, <8 x double> %v2)
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
  %v77 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v76, <8 x double> %v21)
  %v78 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FEC71C71C71C71C), <8 x double> %v16, <8 x double> %v2)
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
  %v94 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v93, <8 x double> %v21)
  %v95 = fsub <8 x double> %v15, %v29
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
  %v110 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v109, <8 x double> %v21)
  %v111 = fsub <8 x double> %v15, %v29
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
  %v127 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v128 = load <8 x double>, ptr %v127, align 64
  %v129 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v122, <8 x double> %v126, <8 x double> %v128)
  %v130 = fmul <8 x double> splat (double 0x3F54320FEDCBA987), %v18
  %v131 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF716B5A550ABFC4), <8 x double> %v57, <8 x double> %v130)
  %v132 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA2EEEEEEEEEEEF), <8 x double> %v72, <8 x double> %v131)
  %v133 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFAA0AD1D2CA1858), <8 x double> %v88, <8 x double> %v132)
  %v134 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA5748A7BDAF0E2), <8 x double> %v104, <8 x double> %v133)
  %v135 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF9999999999999A), <8 x double> %v120, <8 x double> %v134)
  %v136 = fmul <8 x double> %v16, %v135
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
  %v192 = fmul <8 x double> %v16, %v191
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
  %v203 = select <8 x i1> %v146, <8 x double> %v15, <8 x double> %v2
  %v204 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v203, ptr %v204, align 64
  %v205 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v206 = load <8 x double>, ptr %v205, align 64
  %v207 = select <8 x i1> %v146, <8 x double> %v2, <8 x double> %v206
  %v208 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v207, ptr %v208, align 64
  %v209 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v210 = load <8 x double>, ptr %v209, align 64
  %v211 = select <8 x i1> %v146, <8 x double> %v16, <8 x double> %v210
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
  %v250 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v251 = load <8 x double>, ptr %v250, align 64
  %v252 = fcmp olt <8 x double> %v110, %v251
  %v253 = or <8 x i1> zeroinitializer, %v252
  %v254 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v255 = load <8 x double>, ptr %v254, align 64
  %v256 = fcmp ogt <8 x double> %v110, %v255
  %v257 = or <8 x i1> %v253, %v256
  %v258 = and <8 x i1> %v146, %v257
  %v259 = or <8 x i1> %v249, %v258
  %v260 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v261 = load <8 x double>, ptr %v260, align 64
  %v262 = fcmp olt <8 x double> %v261, %v15
  %v263 = fcmp ole <8 x double> %v261, %v15
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
  %v275 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v18, <8 x double> %v274)
  %v276 = fneg <8 x double> %v16
  %v277 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v276, <8 x double> %v120, <8 x double> %v273)
  %v278 = fsub <8 x double> %v277, %v275
  %v279 = fmul <8 x double> splat (double 0xBFF208439215A046), %v18
  %v280 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40056744F3B9A987), <8 x double> %v57, <8 x double> %v279)
  %v281 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC016BDFAC7A2320C), <8 x double> %v72, <8 x double> %v280)
  %v282 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C2CEAE0978C92), <8 x double> %v88, <8 x double> %v281)
  %v283 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFFC46C8B61F95E5), <8 x double> %v104, <8 x double> %v282)
  %v284 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40030F4BDF0DC914), <8 x double> %v120, <8 x double> %v283)
  %v285 = fmul <8 x double> %v16, %v284
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
  %v301 = or i64 %v268, %v270
  br i1 %v272, label %observe, label %judge
observe:
  %v302 = bitcast <8 x i1> %v266 to i8
  %v303 = zext i8 %v302 to i64
  %v304 = call i64 @uq_observe(ptr %lanes, ptr %settings, i64 %v303, i64 %v301)
  br label %judge
judge:
  %v305 = phi i64 [ 0, %move ], [ %v304, %observe ]
  %v306 = trunc i64 %v305 to i8
  %v307 = bitcast i8 %v306 to <8 x i1>
  %v308 = or <8 x i1> %v258, %v307
  %v309 = or <8 x i1> %v249, %v308
  %v310 = bitcast <8 x i1> %v309 to i8
  %v311 = zext i8 %v310 to i64
  %v312 = bitcast <8 x i1> %v309 to i8
  %v313 = icmp ne i8 %v312, 0
  br i1 %v313, label %failure, label %done
failure:
  %v314 = fcmp ogt <8 x double> %v223, splat (double 0x3F50000000000000)
  %v315 = select <8 x i1> %v314, <8 x double> splat (double 0x4008000000000000), <8 x double> splat (double 0x401C000000000000)
  %v316 = fmul <8 x double> %v239, splat (double 0x40C3880000000000)
  %v317 = getelementptr inbounds <8 x double>, ptr %settings, i64 3
  %v318 = load <8 x double>, ptr %v317, align 64
  %v319 = fmul <8 x double> %v291, %v292
  %v320 = fcmp ogt <8 x double> %v319, splat (double 0x0000000000000000)
  %v321 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v291)
  %v322 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v292)
  %v323 = fmul <8 x double> %v316, %v322
  %v324 = fcmp ole <8 x double> %v321, %v323
  %v325 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v291)
  %v326 = fcmp ogt <8 x double> %v325, splat (double 0x5F138D352E5096AF)
  %v327 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v291)
  %v328 = fmul <8 x double> %v122, %v327
  %v329 = fmul <8 x double> %v128, splat (double 0x412E848000000000)
  %v330 = fcmp ogt <8 x double> %v328, %v329
  %v331 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v291)
  %v332 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v292)
  %v333 = fmul <8 x double> %v318, %v332
  %v334 = fcmp ole <8 x double> %v331, %v333
  %v335 = and <8 x i1> %v330, %v334
  %v336 = or <8 x i1> %v324, %v326
  %v337 = or <8 x i1> %v336, %v335
  %v338 = and <8 x i1> %v320, %v337
  %v339 = or <8 x i1> zeroinitializer, %v338
  %v340 = select <8 x i1> %v339, <8 x double> splat (double 0x4010000000000000), <8 x double> %v315
  %v341 = select <8 x i1> %v240, <8 x double> %v340, <8 x double> splat (double 0x4014000000000000)
  %v342 = select <8 x i1> %v308, <8 x double> splat (double 0x4000000000000000), <8 x double> %v341
  %v343 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v342, ptr %v343, align 64
  br label %done
done:
  %v344 = shl i64 %v311, 8
  %v345 = or i64 %v268, %v344
  ret i64 %v345
}

define i64 @uq_observe(ptr noalias %lanes, ptr noalias readonly %settings, i64 %due, i64 %strict) #0 {
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
  %due.now = phi <8 x i1> [ %v4, %entry ], [ %due.then, %values ]
  %at.now = phi <8 x double> [ %v8, %entry ], [ %at.then, %values ]
  %clock.now = phi <8 x i64> [ %v10, %entry ], [ %clock.then, %values ]
  %place.now = phi <8 x i64> [ %v12, %entry ], [ %place.then, %values ]
  %truth_place.now = phi <8 x i64> [ %v14, %entry ], [ %truth_place.then, %values ]
  %strayed.now = phi <8 x i1> [ zeroinitializer, %entry ], [ %strayed.then, %values ]
  %v15 = getelementptr inbounds <8 x double>, ptr %settings, i64 5
  %v16 = load <8 x double>, ptr %v15, align 64
  %v17 = fcmp ogt <8 x double> %v16, splat (double 0x0000000000000000)
  %v18 = bitcast <8 x i1> %v17 to i8
  %v19 = icmp ne i8 %v18, 0
  br i1 %v19, label %judge, label %values
judge:
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v21 = load <8 x double>, ptr %v20, align 64
  %v22 = fsub <8 x double> %at.now, %v21
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = fdiv <8 x double> %v22, %v24
  %v26 = fsub <8 x double> splat (double 0x3FF0000000000000), %v25
  %v27 = fcmp oge <8 x double> %at.now, %v2
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  %v29 = load <8 x double>, ptr %v28, align 64
  %v30 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  %v31 = load <8 x double>, ptr %v30, align 64
  %v32 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v29, <8 x double> %v31)
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  %v34 = load <8 x double>, ptr %v33, align 64
  %v35 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v32, <8 x double> %v34)
  %v36 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  %v37 = load <8 x double>, ptr %v36, align 64
  %v38 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v35, <8 x double> %v37)
  %v39 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  %v40 = load <8 x double>, ptr %v39, align 64
  %v41 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v38, <8 x double> %v40)
  %v42 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v43 = load <8 x double>, ptr %v42, align 64
  %v44 = select <8 x i1> %v27, <8 x double> %v43, <8 x double> %v41
  %v45 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v46 = load <8 x double>, ptr %v45, align 64
  %v47 = fcmp olt <8 x double> %v44, %v46
  %v48 = or <8 x i1> zeroinitializer, %v47
  %v49 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v50 = load <8 x double>, ptr %v49, align 64
  %v51 = fcmp ogt <8 x double> %v44, %v50
  %v52 = or <8 x i1> %v48, %v51
  %v53 = and <8 x i1> %due.now, %v52
  %v54 = xor <8 x i1> %v53, splat (i1 true)
  %v55 = and <8 x i1> %due.now, %v54
  %v56 = or <8 x i1> %strayed.now, %v53
  br label %values
values:
  %due.good = phi <8 x i1> [ %due.now, %next ], [ %v55, %judge ]
  %strayed.then = phi <8 x i1> [ %strayed.now, %next ], [ %v56, %judge ]
  %v57 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v58 = load <8 x double>, ptr %v57, align 64
  %v59 = fsub <8 x double> %at.now, %v58
  %v60 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v61 = load <8 x double>, ptr %v60, align 64
  %v62 = fdiv <8 x double> %v59, %v61
  %v63 = fsub <8 x double> splat (double 0x3FF0000000000000), %v62
  %v64 = fcmp oge <8 x double> %at.now, %v2
  %v65 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v66 = load <8 x double>, ptr %v65, align 64
  %v67 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  %v68 = load <8 x double>, ptr %v67, align 64
  %v69 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  %v70 = load <8 x double>, ptr %v69, align 64
  %v71 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v63, <8 x double> %v68, <8 x double> %v70)
  %v72 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  %v73 = load <8 x double>, ptr %v72, align 64
  %v74 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v62, <8 x double> %v71, <8 x double> %v73)
  %v75 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  %v76 = load <8 x double>, ptr %v75, align 64
  %v77 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v63, <8 x double> %v74, <8 x double> %v76)
  %v78 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  %v79 = load <8 x double>, ptr %v78, align 64
  %v80 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v62, <8 x double> %v77, <8 x double> %v79)
  %v81 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v82 = load <8 x double>, ptr %v81, align 64
  %v83 = select <8 x i1> %v64, <8 x double> %v82, <8 x double> %v80
  %v84 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v85 = load <8 x double>, ptr %v84, align 64
  %v86 = fsub <8 x double> %at.now, %v85
  %v87 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v88 = load <8 x double>, ptr %v87, align 64
  %v89 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v90 = load <8 x double>, ptr %v89, align 64
  %v91 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v86, <8 x double> %v90)
  %v92 = fcmp uno <8 x double> %v83, %v66
  %v93 = fcmp ogt <8 x double> %v83, %v66
  %v94 = getelementptr inbounds <8 x i64>, ptr %settings, i64 8
  %v95 = load <8 x i64>, ptr %v94, align 64
  %v96 = getelementptr inbounds <8 x i64>, ptr %settings, i64 7
  %v97 = load <8 x i64>, ptr %v96, align 64
  %v98 = select <8 x i1> %due.good, <8 x i64> %truth_place.now, <8 x i64> %v95
  %v99 = zext <8 x i1> %v93 to <8 x i8>
  %v100 = select <8 x i1> %v92, <8 x i8> splat (i8 2), <8 x i8> %v99
  %v101 = extractelement <8 x i64> %v98, i64 0
  %v102 = extractelement <8 x i64> %v98, i64 1
  %v103 = extractelement <8 x i64> %v98, i64 2
  %v104 = extractelement <8 x i64> %v98, i64 3
  %v105 = extractelement <8 x i64> %v98, i64 4
  %v106 = extractelement <8 x i64> %v98, i64 5
  %v107 = extractelement <8 x i64> %v98, i64 6
  %v108 = extractelement <8 x i64> %v98, i64 7
  %v109 = inttoptr i64 %v101 to ptr
  %v110 = inttoptr i64 %v102 to ptr
  %v111 = inttoptr i64 %v103 to ptr
  %v112 = inttoptr i64 %v104 to ptr
  %v113 = inttoptr i64 %v105 to ptr
  %v114 = inttoptr i64 %v106 to ptr
  %v115 = inttoptr i64 %v107 to ptr
  %v116 = inttoptr i64 %v108 to ptr
  %v117 = extractelement <8 x i8> %v100, i64 0
  store i8 %v117, ptr %v109, align 1
  %v118 = extractelement <8 x i8> %v100, i64 1
  store i8 %v118, ptr %v110, align 1
  %v119 = extractelement <8 x i8> %v100, i64 2
  store i8 %v119, ptr %v111, align 1
  %v120 = extractelement <8 x i8> %v100, i64 3
  store i8 %v120, ptr %v112, align 1
  %v121 = extractelement <8 x i8> %v100, i64 4
  store i8 %v121, ptr %v113, align 1
  %v122 = extractelement <8 x i8> %v100, i64 5
  store i8 %v122, ptr %v114, align 1
  %v123 = extractelement <8 x i8> %v100, i64 6
  store i8 %v123, ptr %v115, align 1
  %v124 = extractelement <8 x i8> %v100, i64 7
  store i8 %v124, ptr %v116, align 1
  %v125 = add <8 x i64> %truth_place.now, %v97
  %v126 = getelementptr inbounds <8 x i64>, ptr %settings, i64 6
  %v127 = load <8 x i64>, ptr %v126, align 64
  %v128 = select <8 x i1> %due.good, <8 x i64> %place.now, <8 x i64> %v95
  %v129 = extractelement <8 x i64> %v128, i64 0
  %v130 = extractelement <8 x i64> %v128, i64 1
  %v131 = extractelement <8 x i64> %v128, i64 2
  %v132 = extractelement <8 x i64> %v128, i64 3
  %v133 = extractelement <8 x i64> %v128, i64 4
  %v134 = extractelement <8 x i64> %v128, i64 5
  %v135 = extractelement <8 x i64> %v128, i64 6
  %v136 = extractelement <8 x i64> %v128, i64 7
  %v137 = inttoptr i64 %v129 to ptr
  %v138 = inttoptr i64 %v130 to ptr
  %v139 = inttoptr i64 %v131 to ptr
  %v140 = inttoptr i64 %v132 to ptr
  %v141 = inttoptr i64 %v133 to ptr
  %v142 = inttoptr i64 %v134 to ptr
  %v143 = inttoptr i64 %v135 to ptr
  %v144 = inttoptr i64 %v136 to ptr
  %v145 = extractelement <8 x double> %v83, i64 0
  store double %v145, ptr %v137, align 8
  %v146 = extractelement <8 x double> %v83, i64 1
  store double %v146, ptr %v138, align 8
  %v147 = extractelement <8 x double> %v83, i64 2
  store double %v147, ptr %v139, align 8
  %v148 = extractelement <8 x double> %v83, i64 3
  store double %v148, ptr %v140, align 8
  %v149 = extractelement <8 x double> %v83, i64 4
  store double %v149, ptr %v141, align 8
  %v150 = extractelement <8 x double> %v83, i64 5
  store double %v150, ptr %v142, align 8
  %v151 = extractelement <8 x double> %v83, i64 6
  store double %v151, ptr %v143, align 8
  %v152 = extractelement <8 x double> %v83, i64 7
  store double %v152, ptr %v144, align 8
  %v153 = add <8 x i64> %place.now, %v127
  %v154 = select <8 x i1> %due.good, <8 x i64> %v153, <8 x i64> %v95
  %v155 = extractelement <8 x i64> %v154, i64 0
  %v156 = extractelement <8 x i64> %v154, i64 1
  %v157 = extractelement <8 x i64> %v154, i64 2
  %v158 = extractelement <8 x i64> %v154, i64 3
  %v159 = extractelement <8 x i64> %v154, i64 4
  %v160 = extractelement <8 x i64> %v154, i64 5
  %v161 = extractelement <8 x i64> %v154, i64 6
  %v162 = extractelement <8 x i64> %v154, i64 7
  %v163 = inttoptr i64 %v155 to ptr
  %v164 = inttoptr i64 %v156 to ptr
  %v165 = inttoptr i64 %v157 to ptr
  %v166 = inttoptr i64 %v158 to ptr
  %v167 = inttoptr i64 %v159 to ptr
  %v168 = inttoptr i64 %v160 to ptr
  %v169 = inttoptr i64 %v161 to ptr
  %v170 = inttoptr i64 %v162 to ptr
  %v171 = extractelement <8 x double> %v91, i64 0
  store double %v171, ptr %v163, align 8
  %v172 = extractelement <8 x double> %v91, i64 1
  store double %v172, ptr %v164, align 8
  %v173 = extractelement <8 x double> %v91, i64 2
  store double %v173, ptr %v165, align 8
  %v174 = extractelement <8 x double> %v91, i64 3
  store double %v174, ptr %v166, align 8
  %v175 = extractelement <8 x double> %v91, i64 4
  store double %v175, ptr %v167, align 8
  %v176 = extractelement <8 x double> %v91, i64 5
  store double %v176, ptr %v168, align 8
  %v177 = extractelement <8 x double> %v91, i64 6
  store double %v177, ptr %v169, align 8
  %v178 = extractelement <8 x double> %v91, i64 7
  store double %v178, ptr %v170, align 8
  %v179 = add <8 x i64> %v153, %v127
  %v180 = select <8 x i1> %due.good, <8 x i64> splat (i64 8), <8 x i64> zeroinitializer
  %clock.then = add <8 x i64> %clock.now, %v180
  %place.then = add <8 x i64> %place.now, %v180
  %v181 = select <8 x i1> %due.good, <8 x i64> splat (i64 1), <8 x i64> zeroinitializer
  %truth_place.then = add <8 x i64> %truth_place.now, %v181
  %v182 = extractelement <8 x i64> %clock.then, i64 0
  %v183 = extractelement <8 x i64> %clock.then, i64 1
  %v184 = extractelement <8 x i64> %clock.then, i64 2
  %v185 = extractelement <8 x i64> %clock.then, i64 3
  %v186 = extractelement <8 x i64> %clock.then, i64 4
  %v187 = extractelement <8 x i64> %clock.then, i64 5
  %v188 = extractelement <8 x i64> %clock.then, i64 6
  %v189 = extractelement <8 x i64> %clock.then, i64 7
  %v190 = inttoptr i64 %v182 to ptr
  %v191 = inttoptr i64 %v183 to ptr
  %v192 = inttoptr i64 %v184 to ptr
  %v193 = inttoptr i64 %v185 to ptr
  %v194 = inttoptr i64 %v186 to ptr
  %v195 = inttoptr i64 %v187 to ptr
  %v196 = inttoptr i64 %v188 to ptr
  %v197 = inttoptr i64 %v189 to ptr
  %v198 = load double, ptr %v190, align 8
  %v199 = insertelement <8 x double> poison, double %v198, i64 0
  %v200 = load double, ptr %v191, align 8
  %v201 = insertelement <8 x double> %v199, double %v200, i64 1
  %v202 = load double, ptr %v192, align 8
  %v203 = insertelement <8 x double> %v201, double %v202, i64 2
  %v204 = load double, ptr %v193, align 8
  %v205 = insertelement <8 x double> %v203, double %v204, i64 3
  %v206 = load double, ptr %v194, align 8
  %v207 = insertelement <8 x double> %v205, double %v206, i64 4
  %v208 = load double, ptr %v195, align 8
  %v209 = insertelement <8 x double> %v207, double %v208, i64 5
  %v210 = load double, ptr %v196, align 8
  %v211 = insertelement <8 x double> %v209, double %v210, i64 6
  %v212 = load double, ptr %v197, align 8
  %v213 = insertelement <8 x double> %v211, double %v212, i64 7
  %at.then = select <8 x i1> %due.good, <8 x double> %v213, <8 x double> %at.now
  %v214 = fcmp olt <8 x double> %at.then, %v2
  %v215 = fcmp ole <8 x double> %at.then, %v2
  %v216 = select <8 x i1> %v6, <8 x i1> %v214, <8 x i1> %v215
  %due.then = and <8 x i1> %due.good, %v216
  %v217 = bitcast <8 x i1> %due.then to i8
  %v218 = icmp ne i8 %v217, 0
  br i1 %v218, label %next, label %done
done:
  %v219 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  store <8 x double> %at.then, ptr %v219, align 64
  %v220 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 15
  store <8 x i64> %clock.then, ptr %v220, align 64
  %v221 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 16
  store <8 x i64> %place.then, ptr %v221, align 64
  %v222 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 17
  store <8 x i64> %truth_place.then, ptr %v222, align 64
  %v223 = select <8 x i1> %strayed.then, <8 x double> %at.then, <8 x double> %v2
  %v224 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v223, ptr %v224, align 64
  %v225 = bitcast <8 x i1> %strayed.then to i8
  %v226 = zext i8 %v225 to i64
  ret i64 %v226
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
attributes #1 = { nounwind alignstack=64 }
